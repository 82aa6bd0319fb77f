import { describe, expect, it } from "vitest";
import { pricedHere, pricedLines } from "@/lib/pricing/cli/lines";

/** A one-name request whose spread is 10 bp times its number, so that a report tells its line. */
function aText(number: number): string {
  return JSON.stringify({
    format: 1,
    schedule: { kind: "even", years: 5, perYear: 4 },
    discount: { kind: "flat", rate: 0.02 },
    pool: [
      {
        id: "A",
        notional: 1,
        recovery: 0.4,
        credit: { kind: "spread", nodes: [{ years: 5, spread: 0.001 * number }] },
      },
    ],
    correlation: { kind: "flat", rho: 0.3 },
    tranches: [{ id: "first", attachment: 0, detachment: 0.1 }],
  });
}

async function* linesOf(texts: readonly string[]): AsyncGenerator<string> {
  yield* texts;
}

async function allOf(texts: readonly string[]) {
  const lines = [];
  for await (const line of pricedLines(linesOf(texts))) lines.push(line);
  return lines;
}

describe("requests by lines", () => {
  it("come out in their order and with the bits of one thread, however many threads work and whatever a line holds", async () => {
    const texts = Array.from({ length: 60 }, (_, i) => aText(i + 1));
    texts[7] = "{ not json";
    texts[31] = JSON.stringify({ format: 1 });
    const lines = await allOf(texts);
    expect(lines).toEqual(texts.map(pricedHere));
    expect(lines[7]).toHaveProperty("errors");
    expect(lines[31]).toHaveProperty("errors");
  });

  it("pass over empty lines, few or many", async () => {
    expect(await allOf(["", aText(1), " "])).toHaveLength(1);
    expect(await allOf(Array.from({ length: 80 }, (_, i) => (i % 2 ? "" : aText(i + 1))))).toHaveLength(40);
  });
});
