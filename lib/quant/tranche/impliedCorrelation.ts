import { chebyshevPoints, chebyshevValue, correlationOfAngle } from "../maths/chebyshev";
import { scanRoots } from "../maths/roots";
import type { PoolLaws } from "../portfolio/distribution";
import { type TrancheStrikes, trancheProfile } from "./expectedLoss";
import { contractLegs, type LegTimes, upfrontAt } from "./legs";

/** A tranche with the quote that is to be reproduced. */
export interface QuotedTranche extends TrancheStrikes {
  readonly running: number;
  readonly upfront: number;
}

/** Every flat correlation that reproduces a quote, and the upfronts that some correlation in [0, 1] attains. */
export interface ImpliedCorrelation {
  readonly solutions: readonly number[];
  readonly attainable: readonly [number, number];
}

const POINTS = 33;
const SCAN = 128;

/**
 * Implied (compound) correlations of quoted tranches: the upfront at the quote's coupon as a smooth function of
 * u with ρ = sin²(πu/2), sampled once for all tranches, its roots polished with full valuations. A root at an end of the
 * interval is not a solution unless ρ = 0 itself meets the quote.
 */
export function impliedCorrelations(
  laws: PoolLaws,
  times: LegTimes,
  tranches: readonly QuotedTranche[],
): ImpliedCorrelation[] {
  const points = chebyshevPoints(POINTS, 0, 1);
  const samples = points.map((u) => upfrontsAt(laws, times, tranches, correlationOfAngle(u)));
  return tranches.map((tranche, i) => {
    const values = samples.map((sample) => sample[i]!);
    const exact = (u: number) => upfrontsAt(laws, times, [tranche], correlationOfAngle(u))[0]!;
    const scan = scanRoots((u) => chebyshevValue(points, values, u) - tranche.upfront, 0, 1, SCAN);
    const solutions = scan.roots
      .map((u) => polished((v) => exact(v) - tranche.upfront, u))
      .filter((u): u is number => u !== null && u < 1)
      .map(correlationOfAngle);
    const attainable = [extreme(exact, scan.minimum.at), extreme(exact, scan.maximum.at)] as const;
    return { solutions: distinct(solutions), attainable };
  });
}

function upfrontsAt(
  laws: PoolLaws,
  times: LegTimes,
  tranches: readonly QuotedTranche[],
  rho: number,
): number[] {
  const once = laws.forOneDependence();
  return tranches.map((tranche) => {
    const profile = trancheProfile(once, { kind: "common", dependence: { kind: "flat", rho } }, tranche);
    return upfrontAt(contractLegs(times, profile.loss, profile.outstanding), tranche.running);
  });
}

/** The upfront at a turning point of its interpolant, which is flat there. */
function extreme(exact: (u: number) => number, at: number): number {
  return exact(Math.min(Math.max(at, 0), 1));
}

/** Secant steps with full valuations from a root of the interpolant; null when there is no root close by. */
function polished(miss: (u: number) => number, start: number): number | null {
  let before = Math.min(Math.max(start - 1e-4, 0), 1);
  let here = Math.min(Math.max(start, 0), 1);
  if (before === here) before = Math.min(here + 1e-4, 1);
  let missBefore = miss(before);
  let missHere = miss(here);
  for (let step = 0; step < 8 && missHere !== 0; step++) {
    if (missHere === missBefore) return null;
    const next = here - (missHere * (here - before)) / (missHere - missBefore);
    if (!(next >= 0 && next <= 1)) return null;
    before = here;
    missBefore = missHere;
    here = next;
    missHere = miss(here);
    if (Math.abs(here - before) < 1e-11) break;
  }
  return Math.abs(missHere) < 1e-9 ? here : null;
}

function distinct(values: readonly number[]): number[] {
  return values.filter((value, i) => values.findIndex((other) => Math.abs(other - value) < 1e-9) === i);
}
