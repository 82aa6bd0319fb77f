import { Recursion } from "../kernel/recursion";
import type { MixtureAccuracy } from "../maths/adaptiveMixture";
import { normalCdf } from "../maths/normal";
import type { AmountGrid } from "./amountGrid";
import { type MixedLaw, mixedLaw } from "./factorMixture";
import { conditionalSlopes, type FactorNames } from "./factorNames";
import type { AmountLaw } from "./lossLaw";
import { LOWEST_UNSETTLED, momentBelow, unsettledInterval } from "./settledFactor";
import type { PanelAccuracy } from "./settledPanels";
import { transitionPanels } from "./transitionPanels";

/** Accuracy of the mixture over the factor: E[min(X, K)] absolutely, tail probabilities relatively. */
export const MIXTURE_ACCURACY: MixtureAccuracy & PanelAccuracy = { absolute: 1e-12, relative: 1e-8 };

/** Below this factor value nothing is left of the normal law that a figure could show. */
export const LOWEST_FACTOR = -12.5;

/** Weighted conditional mass that is dropped: a tail of 1e-15 keeps six digits. */
const NEGLIGIBLE = 1e-25;
/** The same where only expected losses are asked for. */
const NEGLIGIBLE_IN_MINIMUM = 1e-18;

const SETTLED_TAIL = { absolute: 1e-16, relative: 1e-10 };
const SETTLED_MINIMUM = { absolute: 1e-14, relative: 1 };

/** What a date's law is asked for. */
export interface LawRequest {
  /** Strikes (fractions) at which the law must be accurate. */
  readonly strikes: readonly number[];
  /** Highest amount wanted as an atom; everything above goes into the overflow. Infinity for the whole law. */
  readonly upTo: number;
  /** Only E[min(X, K)] at the strikes is asked for, not the tails beyond them. */
  readonly minimumOnly?: boolean;
  /** Probabilities below this are not held to a relative standard. */
  readonly floor?: number;
}

/**
 * The law of the names' amounts at one date in a one-factor Gaussian copula (Vasicek; Li 2000), loadings in (−1, 1):
 * the recursion on the grid, mixed over the factor where the answer is not settled.
 */
export function oneFactorLaw(
  grid: AmountGrid,
  names: FactorNames,
  { strikes, upTo, minimumOnly = false, floor = 0 }: LawRequest,
): AmountLaw & { readonly evaluations: number } {
  const top = Math.min(grid.top, Math.ceil(Math.min(upTo, 2) / grid.unit + 1e-9));
  const probed = [...new Set(strikes.map((strike) => strike / grid.unit))]
    .filter((strike) => strike > 0 && strike <= top)
    .sort((one, other) => one - other);
  const breaks = Int32Array.from([0, ...probed], (strike) => Math.ceil(strike - 1e-9));
  const negligible = minimumOnly ? NEGLIGIBLE_IN_MINIMUM : NEGLIGIBLE;
  const flat = { ...grid, ...conditionalSlopes(names) };
  const recursion = new Recursion(flat, { top, breaks, negligible });
  if (names.loadings.every((loading) => loading === 0)) return independentLaw(grid, recursion, top);
  const isMonotone = names.loadings.every((loading) => loading >= 0);
  const largest = grid.sizes.reduce((most, size) => Math.max(most, size), 0);
  const { low, high } = unsettledInterval(
    recursion,
    top,
    largest,
    isMonotone,
    minimumOnly ? SETTLED_MINIMUM : SETTLED_TAIL,
  );
  const below = minimumOnly ? 0 : momentBelow(recursion, flat, low);
  const law = mixedLaw(recursion, top, transitionPanels(recursion, low, high), {
    strikes: probed,
    tails: minimumOnly ? 0 : probed.length,
    unit: grid.unit,
    accuracy: minimumOnly ? { absolute: 1e-12, relative: Number.POSITIVE_INFINITY } : MIXTURE_ACCURACY,
    mean: minimumOnly ? null : grid.unit * (meanSteps(grid, names) - below),
    floor,
  });
  law.masses[0]! += normalCdf(-high);
  if (low > LOWEST_UNSETTLED) law.overflow += normalCdf(low);
  if (minimumOnly) return { amounts: gridAmounts(grid, top), ...law };
  return closedAbove(grid, top, law, law.overflowMoment + below);
}

/** A cut law with one atom above the top that has the mass and the mean of all that lies there; a whole law as it is. */
function closedAbove(grid: AmountGrid, top: number, law: MixedLaw, moment: number) {
  if (top === grid.top) return { amounts: gridAmounts(grid, top), ...law };
  const { error, evaluations, overflow } = law;
  const place = overflow > 0 ? Math.max(top + 1, moment / overflow) : top + 1;
  const amounts = Float64Array.from([...gridAmounts(grid, top), place * grid.unit]);
  const masses = new Float64Array(top + 2);
  masses.set(law.masses);
  masses[top + 1] = overflow;
  return { amounts, masses, overflow: 0, error, evaluations };
}

function meanSteps(grid: AmountGrid, { thresholds }: FactorNames): number {
  return thresholds.reduce((sum, threshold, i) => sum + grid.sizes[i]! * normalCdf(threshold), 0);
}

/** Nothing depends on the factor: the law at factor zero. */
function independentLaw(grid: AmountGrid, recursion: Recursion, top: number) {
  const weights = new Float64Array(16);
  weights[0] = 1;
  const { low, masses: kept, overflow, overflowMoments } = recursion.panel(new Float64Array(16), weights);
  const masses = new Float64Array(top + 1);
  masses.set(kept, low);
  const law = {
    masses,
    overflow: overflow[0]!,
    overflowMoment: overflowMoments[0]!,
    error: 0,
    evaluations: 1,
  };
  return closedAbove(grid, top, law, law.overflowMoment);
}

function gridAmounts(grid: AmountGrid, top: number): Float64Array {
  return Float64Array.from({ length: top + 1 }, (_, u) => u * grid.unit);
}
