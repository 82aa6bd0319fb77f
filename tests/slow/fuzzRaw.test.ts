import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import { mustHold, printTally } from "./mustHold";
import { seeds } from "./requests";

afterAll(() => printTally("Raw fuzz"));

describe("FUZZ: raw JSON, never an exception, a number that is not finite, or a hang", () => {
  it("raw JSON values of any shape are refused", () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 2 }), (raw) => {
        expect(mustHold(raw).ok).toBe(false);
      }),
      { numRuns: 76_000 },
    );
  });

  it("JSON texts with characters changed, cut or doubled: what still parses is priced or refused", () => {
    const texts = seeds.map((seed) => JSON.stringify(seed));
    const edits = fc.array(
      fc.tuple(fc.nat(), fc.constantFrom("0", "9", "-", "e9", "e999", ".", '"', "[", "{", ",", "")),
      {
        minLength: 1,
        maxLength: 3,
      },
    );
    fc.assert(
      fc.property(fc.nat(), edits, (pick, list) => {
        let text = texts[pick % texts.length]!;
        for (const [place, put] of list) {
          const at = place % text.length;
          text = text.slice(0, at) + put + text.slice(at + (put === "" ? 1 : place % 2));
        }
        let raw: unknown;
        try {
          raw = JSON.parse(text);
        } catch {
          return;
        }
        mustHold(raw);
      }),
      { numRuns: 20_000 },
    );
  });
});
