import { normalCdf } from "../quant/maths/normal";
import type { Dependence } from "../quant/portfolio/distribution";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import { defaultThreshold } from "../quant/portfolio/thresholds";
import { nameResponses } from "../quant/risk/nameResponses";
import type { Valuation } from "./valuation";

/** What one name alone does to E[min(L, K)] of the pool at dates 1..M: [date][live name], realised losses included. */
export interface StrikeResponse {
  readonly moved: readonly Float64Array[];
  readonly certain: readonly Float64Array[];
}

/**
 * Responses at every strike to each live name's move from its curve to its moved one, and to its default today. Null where
 * the law is not a recursion on a grid: then names are bumped one by one.
 */
export function strikeResponses(
  valuation: Valuation,
  strikes: readonly number[],
  movedNames: readonly PortfolioName[],
): ReadonlyMap<number, StrikeResponse> | null {
  const { dependence, portfolio } = valuation;
  const found = new Map<number, { moved: Float64Array[]; certain: Float64Array[] }>(
    strikes.map((strike) => [strike, { moved: [], certain: [] }]),
  );
  const largest = portfolio.live.reduce((sum, { loss }) => sum + loss, 0);
  const liveOf = (strike: number) => strike - portfolio.realisedLoss;
  const inner = strikes.filter((strike) => liveOf(strike) > 0 && liveOf(strike) < largest - SAME);
  const groups: { readonly dependence: Dependence; readonly strikes: readonly number[] }[] =
    dependence.kind === "common"
      ? [{ dependence: dependence.dependence, strikes: inner }]
      : inner.map((strike) => ({
          dependence: { kind: "flat", rho: dependence.rhoAt(strike) },
          strikes: [strike],
        }));
  for (let j = 1; j < portfolio.times.length; j++) {
    const thresholds = Float64Array.from(portfolio.live, ({ position }) =>
      defaultThreshold(movedNames[position]!.curve, portfolio.times[j]!),
    );
    for (const strike of strikes) {
      const isBeyond = liveOf(strike) >= largest - SAME;
      const at = found.get(strike)!;
      at.moved.push(isBeyond ? meanRise(valuation, j, thresholds) : new Float64Array(portfolio.live.length));
      at.certain.push(isBeyond ? meanRise(valuation, j, null) : new Float64Array(portfolio.live.length));
    }
    for (const group of groups) {
      if (group.strikes.length === 0) continue;
      const model = valuation.laws.recursionAt(j, group.dependence);
      if (!model) return null;
      const { moved, certain } = nameResponses(
        model.grid,
        model.names,
        thresholds,
        group.strikes.map(liveOf),
      );
      const count = portfolio.live.length;
      for (const [s, strike] of group.strikes.entries()) {
        found.get(strike)!.moved[j - 1] = moved.slice(s * count, (s + 1) * count);
        found.get(strike)!.certain[j - 1] = certain.slice(s * count, (s + 1) * count);
      }
    }
  }
  return found;
}

const SAME = 1e-11;

/** Above the largest sum E[min(L, K)] is the mean: what each name adds to it when moved, or (null) when in default. */
function meanRise({ portfolio }: Valuation, j: number, thresholds: Float64Array | null): Float64Array {
  return Float64Array.from(portfolio.live, ({ loss }, k) => {
    const before = portfolio.thresholds[j]![k]!;
    return loss * (thresholds ? normalCdf(thresholds[k]!) - normalCdf(before) : normalCdf(-before));
  });
}
