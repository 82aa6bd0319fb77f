import { price } from "../pricing/price";
import type { PricingAnswer } from "./protocol";

/** Prices one request; the same code runs in server threads, in the browser's worker and on the command line. */
export function answer(request: unknown): PricingAnswer {
  const start = performance.now();
  const outcome = price(request);
  if (!outcome.ok) return { ok: false, problems: outcome.problems };
  return {
    ok: true,
    report: JSON.stringify(outcome.report),
    milliseconds: Math.round(performance.now() - start),
  };
}
