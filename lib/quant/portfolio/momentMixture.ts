import { PANEL_POINTS } from "../kernel/recursion";
import { normalCdf } from "../maths/normal";
import { coherence } from "./continuumError";
import { CumulantPanels } from "./cumulantPanels";
import type { Distribution } from "./distributionQuestions";
import { type AboveStrike, aboveStrike, type SumShape } from "./edgeworth";
import { ConditionalProbabilities, type FactorNames } from "./factorNames";
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
  readonly factor: number;
  readonly weight: number;
}

interface MixedAbove extends AboveStrike {
  /** The sum of the left-out terms' sizes, before they cancel over the factor. */
  readonly leftOutSize: number;
}

interface MomentPanel extends JudgedPanel {
  readonly shapes: readonly WeightedShape[];
}

const PROBE = legendreProbe(PANEL_POINTS);
const ACCURACY = { absolute: 1e-8, relative: 1e-5 };
/** Terms left out cancel over the factor; at least this share of their sizes is counted all the same. */
const UNCANCELLED = 0.1;
/** A conditional deviation below this is rounding: the sum is settled. */
const SETTLED = 1e-9;

/**
 * The law of a sum of many amounts in a one-factor copula: given the factor the sum is nearly normal, and four cumulants say
 * how nearly. Cost is linear in the names. The error is that of the first terms left out, plus that of taking amounts as
 * a continuum: at most a lattice's, the square of its step (the mean amount) times the density over twelve (Euler–Maclaurin).
 * Where that is not `enough` the amounts' own coherence says how much of it there is.
 */
export function momentLaw(
  amounts: Float64Array,
  names: FactorNames,
  strikes: readonly number[],
  enough: number,
): MomentLaw {
  const mean = amounts.reduce((sum, amount, i) => sum + amount * normalCdf(names.thresholds[i]!), 0);
  const cumulants = new CumulantPanels(amounts, names, mean);
  const shapes = mixedShapes(cumulants, strikes);
  const sums = new Map<number, MixedAbove>();
  const above = (strike: number) => {
    const found = sums.get(strike) ?? mixedAbove(shapes, strike);
    sums.set(strike, found);
    return found;
  };
  const excess = (strike: number) =>
    strike <= 0 ? mean - strike : Math.max(0, Math.min(mean, above(strike).excess));
  const probability = (strike: number) =>
    strike < 0 ? 1 : Math.min(1, Math.max(0, above(strike).probability));
  const step = amounts.reduce((sum, amount) => sum + amount, 0) / amounts.length;
  const error = strikes.reduce((worst, strike) => {
    const { density, leftOut, leftOutSize } = above(strike);
    const expansion = Math.max(Math.abs(leftOut), UNCANCELLED * leftOutSize);
    const lattice = (step * step * density) / 12;
    const share =
      expansion + lattice <= enough ? 1 : coherence(amounts, probabilitiesAt(names, shapes, strike));
    return Math.max(worst, expansion + share * lattice);
  }, 0);
  const square = (strike: number) => above(strike).square;
  return {
    questions: {
      between: (attachment, detachment) => Math.max(0, excess(attachment) - excess(detachment)),
      minima: (wanted) => Float64Array.from(wanted, (strike) => mean - excess(Math.max(0, strike))),
      squareBetween: (attachment, detachment) =>
        square(attachment) - square(detachment) - 2 * (detachment - attachment) * excess(detachment),
      above: probability,
      from: probability,
      isAtom: () => false,
      isContinuous: true,
      quantile: (level) => quantile(probability, level, amounts),
      error,
    },
    error,
    evaluations: cumulants.evaluations,
  };
}

/** Default probabilities at the factor value where the sum is expected to meet the strike. */
function probabilitiesAt(names: FactorNames, shapes: readonly WeightedShape[], strike: number): Float64Array {
  const distance = (shape: WeightedShape) => Math.abs(shape.mean - strike);
  const nearest = shapes.reduce((best, shape) => (distance(shape) < distance(best) ? shape : best));
  return new ConditionalProbabilities(names).at(nearest.factor);
}

function mixedAbove(shapes: readonly WeightedShape[], strike: number): MixedAbove {
  const sum = { probability: 0, excess: 0, square: 0, density: 0, leftOut: 0, leftOutSize: 0 };
  for (const shape of shapes) {
    const above = aboveStrike(shape, strike);
    sum.probability += shape.weight * above.probability;
    sum.excess += shape.weight * above.excess;
    sum.square += shape.weight * above.square;
    sum.density += shape.weight * above.density;
    sum.leftOut += shape.weight * above.leftOut;
    sum.leftOutSize += shape.weight * Math.abs(above.leftOut);
  }
  return sum;
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
  const factor = boundaries[boundaries.length - 1]!;
  const settled = { factor, mean: 0, deviation: 0, skewness: 0, kurtosis: 0, weight: normalCdf(-factor) };
  return [...panels.flatMap((panel) => panel.shapes), settled];
}

function shapeAt(cumulants: CumulantPanels, factor: number, weight: number): WeightedShape {
  const [mean, second, third, fourth] = cumulants.at(factor);
  const variance = Math.max(0, second);
  const deviation = Math.sqrt(variance);
  if (deviation < SETTLED) return { factor, mean, deviation: 0, skewness: 0, kurtosis: 0, weight };
  return {
    factor,
    mean,
    deviation,
    skewness: third / (variance * deviation),
    kurtosis: fourth / (variance * variance),
    weight,
  };
}

/** Excess and tail at each strike. */
function judged(shapes: readonly WeightedShape[], strikes: readonly number[]): MomentPanel {
  const values = new Float64Array(2 * strikes.length);
  const errors = new Float64Array(2 * strikes.length);
  const excess = new Float64Array(shapes.length);
  const tail = new Float64Array(shapes.length);
  for (const [i, strike] of strikes.entries()) {
    for (const [k, shape] of shapes.entries()) {
      const above = aboveStrike(shape, strike);
      excess[k] = shape.weight * above.excess;
      tail[k] = shape.weight * above.probability;
    }
    values[2 * i] = excess.reduce((sum, term) => sum + term, 0);
    values[2 * i + 1] = tail.reduce((sum, term) => sum + term, 0);
    errors[2 * i] = legendreError(excess, PROBE);
    errors[2 * i + 1] = legendreError(tail, PROBE);
  }
  return { shapes, values, errors };
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
