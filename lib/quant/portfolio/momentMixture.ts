import { PANEL_POINTS } from "../kernel/recursion";
import { normalCdf } from "../maths/normal";
import { CumulantPanels } from "./cumulantPanels";
import type { Distribution } from "./distributionQuestions";
import { type AboveStrike, aboveStrike, type SumShape } from "./edgeworth";
import type { FactorNames } from "./factorNames";
import { legendreError, legendreProbe } from "./legendreError";
import { type JudgedPanel, settledPanels } from "./settledPanels";

/** A large pool's law given the factor by its cumulants, mixed: what is asked of it, and how far it may be wrong. */
export interface MomentLaw {
  /** Everything but the atoms, which it does not have. */
  readonly questions: Omit<Distribution, "atoms">;
  /** Estimated error of E[min(X, K)] at the worst strike. */
  readonly error: number;
  /** Factor values at which cumulants were worked out. */
  readonly evaluations: number;
}

interface WeightedShape extends SumShape {
  readonly weight: number;
}

interface MomentPanel extends JudgedPanel {
  readonly shapes: readonly WeightedShape[];
}

const PROBE = legendreProbe(PANEL_POINTS);
const ACCURACY = { absolute: 1e-9, relative: 1e-6 };
/** A conditional deviation below this is rounding: the sum is settled. */
const SETTLED = 1e-9;

/**
 * The law of a sum of many amounts in a one-factor copula: given the factor the sum is nearly normal, and four cumulants say
 * how nearly. Cost is linear in the names. The error is that of the first terms left out, plus that of taking amounts as
 * a continuum: the square of a lattice's step times the density over twelve (Euler–Maclaurin), the step at most the mean amount.
 */
export function momentLaw(amounts: Float64Array, names: FactorNames, strikes: readonly number[]): MomentLaw {
  const mean = amounts.reduce((sum, amount, i) => sum + amount * normalCdf(names.thresholds[i]!), 0);
  const cumulants = new CumulantPanels(amounts, names, mean);
  const shapes = mixedShapes(cumulants, strikes);
  const above = (strike: number) => shapes.map((shape) => weighted(aboveStrike(shape, strike), shape.weight));
  const sumOf = (strike: number, part: keyof AboveStrike) =>
    above(strike).reduce((sum, shape) => sum + shape[part], 0);
  const excess = (strike: number) =>
    strike <= 0 ? mean - strike : Math.max(0, Math.min(mean, sumOf(strike, "excess")));
  const probability = (strike: number) =>
    strike < 0 ? 1 : Math.min(1, Math.max(0, sumOf(strike, "probability")));
  const step = mean > 0 ? amounts.reduce((sum, amount) => sum + amount, 0) / amounts.length : 0;
  const errorAt = (strike: number) =>
    sumOf(strike, "leftOut") + (step * step * sumOf(strike, "density")) / 12;
  const error = strikes.reduce((worst, strike) => Math.max(worst, errorAt(strike)), 0);
  const square = (strike: number) => sumOf(strike, "square");
  return {
    questions: {
      between: (attachment, detachment) => Math.max(0, excess(attachment) - excess(detachment)),
      minima: (wanted) => Float64Array.from(wanted, (strike) => mean - excess(Math.max(0, strike))),
      squareBetween: (attachment, detachment) =>
        square(attachment) - square(detachment) - 2 * (detachment - attachment) * excess(detachment),
      above: probability,
      from: probability,
      isAtom: () => false,
      quantile: (level) => quantile(probability, level, amounts),
      error,
    },
    error,
    evaluations: cumulants.evaluations,
  };
}

function weighted(above: AboveStrike, weight: number): AboveStrike {
  return {
    probability: weight * above.probability,
    excess: weight * above.excess,
    square: weight * above.square,
    density: weight * above.density,
    leftOut: weight * above.leftOut,
  };
}

function mixedShapes(cumulants: CumulantPanels, strikes: readonly number[]): readonly WeightedShape[] {
  const { boundaries } = cumulants;
  const panels = settledPanels(
    boundaries,
    { accuracy: ACCURACY, floor: 0, known: null },
    (factors, weights) =>
      judged(
        Array.from(factors, (factor, k) => shapeAt(cumulants, factor, weights[k]!)),
        strikes,
      ),
  );
  const beyond = normalCdf(-boundaries[boundaries.length - 1]!);
  const settled = { mean: 0, deviation: 0, skewness: 0, kurtosis: 0, weight: beyond };
  return [...panels.flatMap((panel) => panel.shapes), settled];
}

function shapeAt(cumulants: CumulantPanels, factor: number, weight: number): WeightedShape {
  const [mean, second, third, fourth] = cumulants.at(factor);
  const variance = Math.max(0, second);
  const deviation = Math.sqrt(variance);
  if (deviation < SETTLED) return { mean, deviation: 0, skewness: 0, kurtosis: 0, weight };
  return {
    mean,
    deviation,
    skewness: third / (variance * deviation),
    kurtosis: fourth / (variance * variance),
    weight,
  };
}

/** Excess and tail at each strike. */
function judged(shapes: readonly WeightedShape[], strikes: readonly number[]): MomentPanel {
  const terms = strikes.flatMap((strike) => {
    const above = shapes.map((shape) => weighted(aboveStrike(shape, strike), shape.weight));
    return [above.map((shape) => shape.excess), above.map((shape) => shape.probability)];
  });
  return {
    shapes,
    values: Float64Array.from(terms, (part) => part.reduce((sum, term) => sum + term, 0)),
    errors: Float64Array.from(terms, (part) => legendreError(Float64Array.from(part), PROBE)),
  };
}

/** Smallest amount x with P(X ≤ x) ≥ level, by bisection. */
function quantile(probability: (strike: number) => number, level: number, amounts: Float64Array): number {
  let low = 0;
  let high = amounts.reduce((sum, amount) => sum + amount, 0);
  for (let step = 0; step < 48; step++) {
    const middle = 0.5 * (low + high);
    if (probability(middle) <= 1 - level) high = middle;
    else low = middle;
  }
  return high;
}
