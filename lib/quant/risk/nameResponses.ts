import { Recursion } from "../kernel/recursion";
import { normalCdf } from "../maths/normal";
import type { AmountGrid } from "../portfolio/amountGrid";
import { conditionalSlopes, type FactorNames } from "../portfolio/factorNames";
import { legendreError, legendreProbe } from "../portfolio/legendreError";
import { unsettledInterval } from "../portfolio/settledFactor";
import { type JudgedPanel, settledPanels } from "../portfolio/settledPanels";
import { transitionPanels } from "../portfolio/transitionPanels";
import { LeaveOneOut } from "./leaveOneOut";

/** How E[min(X, K)] answers to one name alone: [strike][name], fractions of the pool. */
export interface NameResponses {
  /** When the name's threshold moves to its moved one. */
  readonly moved: Float64Array;
  /** When the name defaults for certain. */
  readonly certain: Float64Array;
}

const POINTS = 16;
const PROBE = legendreProbe(POINTS);
const NEGLIGIBLE = 1e-18;
const SETTLED = { absolute: 1e-11, relative: 1 };
const STANDARD = { accuracy: { absolute: 1e-8, relative: Number.POSITIVE_INFINITY }, floor: 0, known: null };

interface ResponsePanel extends JudgedPanel, NameResponses {}

/**
 * Exact for finite moves: given the factor, E[min(X, K)] is linear in each name's default probability, and its slope is
 * what the leave-one-out laws say (stored-state adjoint of the recursion). Strikes ascend, above zero and below the largest sum.
 */
export function nameResponses(
  grid: AmountGrid,
  names: FactorNames,
  movedThresholds: Float64Array,
  strikes: readonly number[],
): NameResponses {
  const count = names.thresholds.length;
  const steps = strikes.map((strike) => strike / grid.unit);
  const top = Math.min(grid.top, Math.ceil(steps[steps.length - 1]! + 1e-9));
  const { scaled, slopes } = conditionalSlopes(names);
  const movedScaled = conditionalSlopes({ ...names, thresholds: movedThresholds }).scaled;
  const recursion = new Recursion(
    { ...grid, scaled, slopes },
    { top, breaks: Int32Array.of(0), negligible: NEGLIGIBLE },
  );
  const adjoint = new LeaveOneOut(grid, top, steps);
  const probabilities = new Float64Array(count);
  const workOut = (factors: Float64Array, weights: Float64Array): ResponsePanel => {
    const moved = new Float64Array(steps.length * count);
    const certain = new Float64Array(steps.length * count);
    const minima = steps.map(() => new Float64Array(factors.length));
    for (let q = 0; q < factors.length; q++) {
      const m = factors[q]!;
      for (let i = 0; i < count; i++) probabilities[i] = normalCdf(scaled[i]! - slopes[i]! * m);
      const weight = weights[q]! * grid.unit;
      adjoint.workOut(probabilities);
      for (let s = 0; s < steps.length; s++) minima[s]![q] = weight * adjoint.minima[s]!;
      for (let i = 0; i < count; i++) {
        const rise = weight * (normalCdf(movedScaled[i]! - slopes[i]! * m) - probabilities[i]!);
        const rest = weight * (1 - probabilities[i]!);
        for (let s = 0; s < steps.length; s++) {
          const slope = adjoint.slopes[s * count + i]!;
          moved[s * count + i]! += rise * slope;
          certain[s * count + i]! += rest * slope;
        }
      }
    }
    const values = Float64Array.from(minima, (terms) => terms.reduce((sum, term) => sum + term, 0));
    return {
      moved,
      certain,
      values,
      errors: Float64Array.from(minima, (terms) => legendreError(terms, PROBE)),
    };
  };
  if (names.loadings.every((loading) => loading === 0))
    return workOut(Float64Array.of(0), Float64Array.of(1));
  const isMonotone = names.loadings.every((loading) => loading >= 0);
  const largest = grid.sizes.reduce((most, size) => Math.max(most, size), 0);
  const { low, high } = unsettledInterval(recursion, top, largest, isMonotone, SETTLED);
  const panels = settledPanels(transitionPanels(recursion, low, high), STANDARD, workOut);
  const sum = (part: "moved" | "certain") => {
    const total = new Float64Array(steps.length * count);
    for (const panel of panels) for (let k = 0; k < total.length; k++) total[k]! += panel[part][k]!;
    return total;
  };
  const certain = sum("certain");
  // Above the interval nothing else is lost: a name in default is alone there.
  const beyond = normalCdf(-high);
  for (const [s, strike] of steps.entries())
    for (let i = 0; i < count; i++) {
      let alone = 0;
      for (let k = 0; k < 3; k++) alone += grid.weights[3 * i + k]! * Math.min(grid.steps[i]! + k, strike);
      certain[s * count + i]! += beyond * grid.unit * alone;
    }
  return { moved: sum("moved"), certain };
}
