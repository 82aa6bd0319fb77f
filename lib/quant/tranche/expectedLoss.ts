import type { Dependence, PoolLaws } from "../portfolio/distribution";

/** A tranche by its strikes, fractions of the pool's initial notional. */
export interface TrancheStrikes {
  readonly attachment: number;
  readonly detachment: number;
  /** Recoveries pay the tranche down from the top. */
  readonly recoveryPaydown: boolean;
}

/** The dependence at which a strike is read: the same everywhere, or a base correlation of the strike. */
export type StrikeDependence =
  | { readonly kind: "common"; readonly dependence: Dependence }
  | { readonly kind: "byStrike"; rhoAt(strike: number): number };

/** Expected loss and paid-down fraction of a tranche at dates 0..M, fractions of its own notional. */
export interface TrancheProfile {
  readonly loss: Float64Array;
  readonly paidDown: Float64Array;
  readonly outstanding: Float64Array;
}

/** EL(t_j), AM(t_j) and O(t_j) of a tranche at every date. */
export function trancheProfile(
  laws: PoolLaws,
  dependence: StrikeDependence,
  tranche: TrancheStrikes,
): TrancheProfile {
  const { attachment, detachment } = tranche;
  const width = detachment - attachment;
  const dates = laws.portfolio.times.length;
  const loss = new Float64Array(dates);
  const paidDown = new Float64Array(dates);
  const outstanding = new Float64Array(dates);
  for (let j = 0; j < dates; j++) {
    loss[j] = amountBetween(laws, dependence, "loss", j, attachment, detachment) / width;
    if (tranche.recoveryPaydown) {
      paidDown[j] = amountBetween(laws, dependence, "recovery", j, 1 - detachment, 1 - attachment) / width;
    }
    outstanding[j] = Math.max(0, 1 - loss[j]! - paidDown[j]!);
  }
  return { loss, paidDown, outstanding };
}

/**
 * E[min((S − A)⁺, D − A)] of the whole pool's sum S, realised part included. Under a base curve each strike has its
 * own law; a recovery strike 1 − K is read at the correlation of K.
 */
export function amountBetween(
  laws: PoolLaws,
  dependence: StrikeDependence,
  kind: "loss" | "recovery",
  j: number,
  low: number,
  high: number,
): number {
  const { realisedLoss, realisedRecovery } = laws.portfolio;
  const realised = kind === "loss" ? realisedLoss : realisedRecovery;
  const certain = Math.min(Math.max(realised - low, 0), high - low);
  const from = Math.max(low - realised, 0);
  const to = Math.max(high - realised, 0);
  if (j === 0 || to <= from) return certain;
  if (dependence.kind === "common")
    return certain + laws.whole(kind, j, dependence.dependence).between(from, to);
  const strikeOf = (strike: number) => (kind === "loss" ? strike : 1 - strike);
  return (
    certain +
    baseMinimum(laws, kind, j, to, dependence.rhoAt(strikeOf(high))) -
    baseMinimum(laws, kind, j, from, dependence.rhoAt(strikeOf(low)))
  );
}

function baseMinimum(
  laws: PoolLaws,
  kind: "loss" | "recovery",
  j: number,
  strike: number,
  rho: number,
): number {
  return strike <= 0 ? 0 : laws.expectedMinimum(kind, j, { kind: "flat", rho }, strike);
}
