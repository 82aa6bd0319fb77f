import { expect } from "vitest";
import { type PricingOutcome, price } from "@/lib/pricing/price";
import { reportSchema } from "@/lib/pricing/report";

/** Longest time any request may take here; all of them are small. */
const PATIENCE_MS = 10_000;

const tally = { priced: 0, refused: 0, slowest: 0 };

/** Writes what became of the requests so far. */
export function printTally(title: string): void {
  const { priced, refused, slowest } = tally;
  process.stdout.write(`${title}: ${priced} priced, ${refused} refused, slowest ${Math.round(slowest)} ms\n`);
}

function firstNumberThatIsNotFinite(value: unknown, path = ""): string | null {
  if (typeof value === "number") return Number.isFinite(value) ? null : path;
  if (typeof value !== "object" || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    const found = firstNumberThatIsNotFinite(inner, `${path}.${key}`);
    if (found) return found;
  }
  return null;
}

/** What must hold of any request whatsoever; throws where it does not. */
export function mustHold(raw: unknown): PricingOutcome {
  const start = performance.now();
  const outcome = price(raw);
  const took = performance.now() - start;
  tally.slowest = Math.max(tally.slowest, took);
  expect(took, "the request hung").toBeLessThan(PATIENCE_MS);
  if (outcome.ok) {
    tally.priced++;
    const place = firstNumberThatIsNotFinite(outcome.report);
    if (place) throw new Error(`the report has a number that is not finite at ${place}`);
    const form = reportSchema.safeParse(outcome.report);
    if (!form.success) throw new Error(`the report has not its form: ${form.error.message}`);
    return outcome;
  }
  tally.refused++;
  if (outcome.problems.length === 0) throw new Error("refused without a problem");
  for (const { code, path, message } of outcome.problems) {
    if (code === "" || typeof path !== "string")
      throw new Error(`a problem without code or path: ${message}`);
    if (message.length < 12 || !message.endsWith(".") || message.includes("[object"))
      throw new Error(`not a message for a person: ${message}`);
  }
  return outcome;
}
