import { brentRoot } from "../maths/roots";
import type { Distribution, PoolLaws } from "../portfolio/distribution";

/** How a strike of a pool is matched with a strike of the quoted index pool. */
export type MappingKind = "none" | "moneyness" | "lossShare" | "probability";

/** The two pools of a mapping, laws at maturity. */
export interface MappedPools {
  readonly index: PoolLaws;
  readonly pool: PoolLaws;
  readonly rhoAt: (strike: number) => number;
}

const SCAN = 40;

/** The index strike K* that corresponds to a strike of the pool, or null where there is none. */
export function mappedStrike(kind: MappingKind, pools: MappedPools, strike: number): number | null {
  if (kind === "none") return strike;
  if (kind === "moneyness") {
    const mapped = (strike * poolLoss(pools.index)) / poolLoss(pools.pool);
    return mapped <= 1 ? mapped : null;
  }
  const match = kind === "lossShare" ? lossShare : cumulativeProbability;
  const target = (rho: number) => match(pools.pool, strike, rho);
  const miss = (mapped: number) => {
    const rho = pools.rhoAt(mapped);
    return match(pools.index, mapped, rho) - target(rho);
  };
  return firstRoot(miss);
}

/** The first sign change from below to above zero on [0, 1], or null. */
function firstRoot(miss: (strike: number) => number): number | null {
  const atZero = miss(0);
  if (atZero === 0) return 0;
  if (atZero > 0) return null;
  for (let i = 1; i <= SCAN; i++) {
    const to = i / SCAN;
    if (miss(to) >= 0) return brentRoot(miss, (i - 1) / SCAN, to, 1e-13);
  }
  return null;
}

function poolLoss(laws: PoolLaws): number {
  const { expectedLoss } = laws.portfolio;
  return expectedLoss[expectedLoss.length - 1]!;
}

function lawAtMaturity(laws: PoolLaws, rho: number): Distribution {
  return laws.forOneDependence().whole("loss", laws.portfolio.times.length - 1, { kind: "flat", rho });
}

/** E[min(L, K)]/E[L]. */
function lossShare(laws: PoolLaws, strike: number, rho: number): number {
  const { realisedLoss } = laws.portfolio;
  const live = Math.max(0, strike - realisedLoss);
  return (Math.min(realisedLoss, strike) + lawAtMaturity(laws, rho).between(0, live)) / poolLoss(laws);
}

/** P(L ≤ K), joined linearly between multiples of the unit. */
function cumulativeProbability(laws: PoolLaws, strike: number, rho: number): number {
  const law = lawAtMaturity(laws, rho);
  const live = strike - laws.portfolio.realisedLoss;
  if (live < 0) return 0;
  const atoms = law.atoms;
  if (!atoms) return 1 - law.above(live);
  const { amounts, masses } = atoms;
  let cumulative = 0;
  for (let i = 0; i < amounts.length; i++) {
    const before = cumulative;
    cumulative += masses[i]!;
    if (amounts[i]! >= live) {
      if (i === 0 || amounts[i]! === live) return cumulative;
      const from = amounts[i - 1]!;
      return before + ((cumulative - before) * (live - from)) / (amounts[i]! - from);
    }
  }
  return 1;
}
