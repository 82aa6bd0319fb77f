import { cumulativeHazard, type SurvivalCurve } from "../market/survivalCurve";
import { exp, expm1 } from "../maths/elementary";
import { normalQuantile, normalQuantileComplement } from "../maths/normal";

/**
 * Default threshold c(t) = Φ⁻¹(p(t)), from whichever of p and 1 − p is the smaller, so that neither tail loses
 * digits; −∞ where default is impossible, +∞ where it is certain.
 */
export function defaultThreshold(curve: SurvivalCurve, t: number): number {
  const hazard = cumulativeHazard(curve, t);
  return hazard < 0.6931471805599453
    ? normalQuantile(-expm1(-hazard))
    : normalQuantileComplement(exp(-hazard));
}
