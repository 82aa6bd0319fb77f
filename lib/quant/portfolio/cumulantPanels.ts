import { PANEL_POINTS, Recursion } from "../kernel/recursion";
import { normalCdf } from "../maths/normal";
import { gaussLegendre } from "../maths/quadrature";
import { conditionalSlopes, type FactorNames } from "./factorNames";
import { LOWEST_UNSETTLED } from "./settledFactor";

const RULE = gaussLegendre(PANEL_POINTS);
/** Barycentric weights of the Gauss–Legendre nodes: (−1)^k √((1 − x²) w) (Wang & Xiang 2012). */
const BARYCENTRIC = RULE.nodes.map(
  (x, k) => (k % 2 === 0 ? 1 : -1) * Math.sqrt((1 - x * x) * RULE.weights[k]!),
);
const ORDERS = 4;
const WIDEST = 4;
/** Share of the mean that may lie above the last panel. */
const NO_MORE_LOSS = 1e-13;

/**
 * The first four cumulants of a conditional sum as functions of the factor. They are sums of the names' own functions, as
 * smooth as one name's default probability however many names there are: worked out at sixteen points a panel of that
 * width and interpolated in between, so that only the panels cost a pass over the names.
 */
export class CumulantPanels {
  readonly boundaries: readonly number[];
  private readonly values: readonly Float64Array[];

  constructor(amounts: Float64Array, names: FactorNames, mean: number) {
    const count = amounts.length;
    const blank = { steps: new Int32Array(count), weights: new Float64Array(3 * count), sizes: amounts };
    const slopes = conditionalSlopes(names);
    const recursion = new Recursion(
      { ...blank, ...slopes },
      { top: 0, breaks: Int32Array.of(0), negligible: 0 },
    );
    const steepest = slopes.slopes.reduce((most, slope) => Math.max(most, Math.abs(slope)), 0);
    const isMonotone = slopes.slopes.every((slope) => slope >= 0);
    const high = isMonotone ? lastFactor(recursion, mean) : -LOWEST_UNSETTLED;
    const panels = Math.ceil((high - LOWEST_UNSETTLED) / Math.min(WIDEST, 4 / steepest));
    const width = (high - LOWEST_UNSETTLED) / panels;
    this.boundaries = Array.from({ length: panels + 1 }, (_, i) => LOWEST_UNSETTLED + i * width);
    this.values = this.boundaries.slice(1).map((to, i) => panelValues(recursion, this.boundaries[i]!, to));
  }

  /** Factor values at which the names were passed over. */
  get evaluations(): number {
    return this.values.length * PANEL_POINTS;
  }

  /** The cumulants at a factor value between the first and the last boundary. */
  at(factor: number): readonly [number, number, number, number] {
    const { boundaries, values } = this;
    const from = boundaries[0]!;
    const width = boundaries[1]! - from;
    const panel = Math.min(Math.max(Math.floor((factor - from) / width), 0), values.length - 1);
    const x = (2 * (factor - boundaries[panel]!)) / width - 1;
    return interpolated(values[panel]!, x);
  }
}

/** Where the mean has come down to nothing, on a coarse grid. */
function lastFactor(recursion: Recursion, mean: number): number {
  for (let m = 1; m < -LOWEST_UNSETTLED - 1; m += 1) {
    const [left] = recursion.cumulantsAt(m, m);
    if (left! * normalCdf(-m) < NO_MORE_LOSS * mean) return m;
  }
  return -LOWEST_UNSETTLED;
}

/** [point][order]. */
function panelValues(recursion: Recursion, from: number, to: number): Float64Array {
  const values = new Float64Array(ORDERS * PANEL_POINTS);
  const half = 0.5 * (to - from);
  for (let k = 0; k < PANEL_POINTS; k += 2) {
    const centre = from + half;
    const found = recursion.cumulantsAt(centre + half * RULE.nodes[k]!, centre + half * RULE.nodes[k + 1]!);
    for (let order = 0; order < ORDERS; order++) {
      values[ORDERS * k + order] = found[2 * order]!;
      values[ORDERS * (k + 1) + order] = found[2 * order + 1]!;
    }
  }
  return values;
}

function interpolated(values: Float64Array, x: number): readonly [number, number, number, number] {
  let [first, second, third, fourth, total] = [0, 0, 0, 0, 0];
  for (let k = 0; k < PANEL_POINTS; k++) {
    const distance = x - RULE.nodes[k]!;
    const at = ORDERS * k;
    if (Math.abs(distance) < 1e-14) return [values[at]!, values[at + 1]!, values[at + 2]!, values[at + 3]!];
    const weight = BARYCENTRIC[k]! / distance;
    total += weight;
    first += weight * values[at]!;
    second += weight * values[at + 1]!;
    third += weight * values[at + 2]!;
    fourth += weight * values[at + 3]!;
  }
  return [first / total, second / total, third / total, fourth / total];
}
