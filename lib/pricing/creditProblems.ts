import { marketSide, nameCurve } from "./curves";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import { nameSchema, type PricingRequest } from "./request";

/**
 * Curve problems of a request that is refused for other reasons too: every name whose own form is sound is tried on the
 * market side, where that is sound, so that one reading shows everything.
 */
export function creditProblems(raw: unknown): PricingProblem[] {
  if (typeof raw !== "object" || raw === null) return [];
  const loose = raw as Record<string, unknown>;
  if (!Array.isArray(loose.pool)) return [];
  const bare = {
    format: 1,
    schedule: loose.schedule,
    discount: loose.discount,
    ...(loose.pricingDate === undefined ? {} : { pricingDate: loose.pricingDate }),
    pool: [{ id: "probe", notional: 1, recovery: 0, credit: { kind: "hazard", rate: 0 } }],
    correlation: { kind: "flat", rho: 0 },
    tranches: [],
  };
  const checked = checkRequest(bare);
  if (!checked.ok) return [];
  const problems: PricingProblem[] = [];
  const market = marketSide(checked.request as PricingRequest, problems);
  if (!market) return problems;
  for (const [i, row] of loose.pool.entries()) {
    const name = nameSchema.safeParse(row);
    if (name.success) nameCurve(name.data, market, `pool.${i}`, problems);
  }
  return problems;
}
