import { ConditionalLaw } from "../kernel/recursion";
import {
  type ConditionalFamily,
  type MixtureAccuracy,
  mixOverFactor,
  surveyProbes,
  withoutFactor,
} from "../maths/adaptiveMixture";
import { normalCdf } from "../maths/normal";
import type { AmountGrid } from "./amountGrid";
import { ConditionalProbabilities, type FactorNames } from "./factorNames";
import { panelBoundaries, settledFrom } from "./factorPanels";
import type { AmountLaw } from "./lossLaw";

/** Accuracy of the mixture over the factor: E[min(X, K)] absolutely, tail probabilities relatively. */
export const MIXTURE_ACCURACY: MixtureAccuracy = { absolute: 1e-12, relative: 1e-8 };

/** Below this factor value nothing is left of the normal law that a figure could show. */
export const LOWEST_FACTOR = -12.5;

/** The recursion on a grid as a family of conditional laws, judged by E[min(X, K)] and P(X > K) at the strikes. */
export class GridFamily implements ConditionalFamily {
  readonly probes: number;
  readonly total: Float64Array;
  totalOverflow = 0;
  private readonly panel: Float64Array;
  private panelOverflow = 0;
  private panelLow: number;
  private panelHigh = -1;
  private readonly law: ConditionalLaw;

  constructor(
    private readonly grid: AmountGrid,
    private readonly conditional: ConditionalProbabilities,
    /** Strikes in grid steps. */
    private readonly strikes: readonly number[],
    top: number,
  ) {
    this.law = new ConditionalLaw(top);
    this.total = new Float64Array(top + 1);
    this.panel = new Float64Array(top + 1);
    this.panelLow = top + 1;
    this.probes = 2 * strikes.length;
  }

  evaluate(factor: number, probes: Float64Array): void {
    this.law.reset();
    this.law.addAll(this.grid, this.conditional.at(factor));
    const { mass, low, high, overflow } = this.law;
    const { unit } = this.grid;
    for (const [i, strike] of this.strikes.entries()) {
      let above = overflow;
      let below = 0;
      const split = Math.ceil(strike - 1e-9);
      for (let u = high; u >= Math.max(split, low); u--) above += mass[u]!;
      for (let u = Math.min(split - 1, high); u >= low; u--) below += u * mass[u]!;
      probes[2 * i] = unit * (below + strike * above);
      probes[2 * i + 1] = above;
    }
  }

  clearPanel(): void {
    if (this.panelHigh >= this.panelLow) this.panel.fill(0, this.panelLow, this.panelHigh + 1);
    this.panelLow = this.panel.length;
    this.panelHigh = -1;
    this.panelOverflow = 0;
  }

  accumulate(weight: number): void {
    const { mass, low, high, overflow } = this.law;
    const { panel } = this;
    for (let u = low; u <= high; u++) panel[u]! += weight * mass[u]!;
    this.panelOverflow += weight * overflow;
    this.panelLow = Math.min(this.panelLow, low);
    this.panelHigh = Math.max(this.panelHigh, high);
  }

  acceptPanel(): void {
    for (let u = this.panelLow; u <= this.panelHigh; u++) this.total[u]! += this.panel[u]!;
    this.totalOverflow += this.panelOverflow;
  }
}

/** What a date's law is asked for: strikes (fractions) that must be accurate, and how far up the atoms must go. */
export interface LawRequest {
  readonly strikes: readonly number[];
  /** Highest amount wanted as an atom; everything above goes into the overflow. Infinity for the whole law. */
  readonly upTo: number;
}

/**
 * The law of the names' amounts at one date in a one-factor Gaussian copula (Vasicek; Li 2000), loadings in (−1, 1):
 * the recursion on the grid, mixed over the factor.
 */
export function oneFactorLaw(
  grid: AmountGrid,
  names: FactorNames,
  request: LawRequest,
  expected: Float64Array | null = null,
): AmountLaw & { readonly totals: Float64Array; readonly evaluations: number } {
  const top = Math.min(grid.top, Math.ceil(Math.min(request.upTo, 2) / grid.unit + 1e-9));
  const conditional = new ConditionalProbabilities(names);
  const strikes = request.strikes.map((strike) => strike / grid.unit);
  const family = new GridFamily(grid, conditional, strikes, top);
  if (names.loadings.every((loading) => loading === 0)) {
    withoutFactor(family);
    return finished(grid, family, 0, new Float64Array(family.probes), 1);
  }
  const high = settledFrom(names);
  const boundaries = panelBoundaries(gridSizes(grid), names, LOWEST_FACTOR, high);
  const likely = expected ?? surveyProbes(family, boundaries);
  const record = mixOverFactor(family, boundaries, MIXTURE_ACCURACY, likely);
  family.total[0]! += normalCdf(-high);
  return finished(grid, family, record.error, record.totals, record.evaluations);
}

/** Each name's amount in grid steps. */
export function gridSizes(grid: AmountGrid): number[] {
  return grid.shares.map(
    (share) => share.steps + share.weights.reduce((sum, weight, k) => sum + k * weight, 0),
  );
}

function finished(
  grid: AmountGrid,
  family: GridFamily,
  error: number,
  totals: Float64Array,
  evaluations: number,
) {
  const amounts = new Float64Array(family.total.length);
  for (let u = 0; u < amounts.length; u++) amounts[u] = u * grid.unit;
  return { amounts, masses: family.total, overflow: family.totalOverflow, error, totals, evaluations };
}
