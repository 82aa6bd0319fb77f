import { exp, expm1, log1p } from "../maths/elementary";

/**
 * Survival Q(t) = exp(−H(t)), the hazard piecewise constant between nodes and flat after the last.
 * `cumulative` holds H at the nodes; a node may be infinite (certain default after the node before it).
 */
export interface SurvivalCurve {
  /** Node times in years, ascending, above zero. */
  readonly times: readonly number[];
  readonly cumulative: readonly number[];
  /** In default already: Q = 0 from the start. */
  readonly defaulted: boolean;
}

/** A flat hazard rate. */
export function flatHazard(rate: number): SurvivalCurve {
  return { times: [1], cumulative: [rate], defaulted: false };
}

/** A yearly default probability p: hazard −ln(1 − p). */
export function yearlyDefault(probability: number): SurvivalCurve {
  return flatHazard(-log1p(-probability));
}

/** Cumulative default probabilities at increasing times; ln Q linear between them. */
export function cumulativeDefault(
  nodes: readonly { readonly years: number; readonly probability: number }[],
): SurvivalCurve {
  return {
    times: nodes.map((node) => node.years),
    cumulative: nodes.map((node) => -log1p(-node.probability)),
    defaulted: false,
  };
}

/** A name already in default. */
export function defaultedName(): SurvivalCurve {
  return { times: [1], cumulative: [Number.POSITIVE_INFINITY], defaulted: true };
}

/** H(t) for t ≥ 0; infinite where default is certain. */
export function cumulativeHazard(curve: SurvivalCurve, t: number): number {
  if (curve.defaulted) return Number.POSITIVE_INFINITY;
  if (t <= 0) return 0;
  const { times, cumulative } = curve;
  let i = 0;
  while (i < times.length && times[i]! < t) i++;
  if (i < times.length && times[i] === t) return cumulative[i]!;
  const piece = Math.min(i, times.length - 1);
  const from = times[piece - 1] ?? 0;
  const base = cumulative[piece - 1] ?? 0;
  const end = cumulative[piece]!;
  if (end === Number.POSITIVE_INFINITY) return end;
  const hazard = (end - base) / (times[piece]! - from);
  return i < times.length ? base + hazard * (t - from) : end + hazard * (t - times[piece]!);
}

/** P(τ ≤ t), keeping the digits of small probabilities. */
export function defaultProbability(curve: SurvivalCurve, t: number): number {
  return -expm1(-cumulativeHazard(curve, t));
}

/** Q(t) = P(τ > t), keeping the digits of small survivals. */
export function survivalProbability(curve: SurvivalCurve, t: number): number {
  return exp(-cumulativeHazard(curve, t));
}
