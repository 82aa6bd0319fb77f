import { normalCdf, normalDensity } from "./normal";

/** Positive nodes of the 21-point Kronrod rule, descending; every second one (from the second) is a 10-point Gauss node. */
const KRONROD_NODES = [
  0.995657163025808080735527280689003, 0.973906528517171720077964012084452,
  0.930157491355708226001207180059508, 0.865063366688984510732096688423493,
  0.780817726586416897063717578345042, 0.679409568299024406234327365114874,
  0.562757134668604683339000099272694, 0.433395394129247190799265943165784,
  0.294392862701460198131126603103866, 0.14887433898163121088482600112972,
];
const KRONROD_WEIGHTS = [
  0.011694638867371874278064396062192, 0.03255816230796472747881897245939, 0.05475589657435199603138130024458,
  0.07503967481091995276704314091619, 0.093125454583697605535065465083366,
  0.109387158802297641899210590325805, 0.123491976262065851077958109585166,
  0.134709217311473325928054001771707, 0.142775938577060080797094273138717,
  0.147739104901338491374841515972068,
];
const KRONROD_CENTRE = 0.149445554002916905664936468389821;
const GAUSS_WEIGHTS = [
  0.066671344308688137593568809893332, 0.149451349150580593145863396957697,
  0.219086362515982043995534934228163, 0.269266719309996355091226921569469,
  0.295524224714752870173815619188769,
];

/** All 21 nodes ascending with their Kronrod and (zero where absent) Gauss weights. */
const RULE = Array.from({ length: 21 }, (_, k) => {
  const i = k < 10 ? k : 20 - k;
  const gauss = i % 2 === 1 ? GAUSS_WEIGHTS[(i - 1) / 2]! : 0;
  if (k === 10) return { node: 0, kronrod: KRONROD_CENTRE, gauss: 0 };
  return { node: k < 10 ? -KRONROD_NODES[i]! : KRONROD_NODES[i]!, kronrod: KRONROD_WEIGHTS[i]!, gauss };
});

/** What the mixture asks of a family of conditional laws. */
export interface ConditionalFamily {
  /** How many probe values the accuracy is judged by. */
  readonly probes: number;
  /** Works out the conditional law at a factor value and writes its probe values. */
  evaluate(factor: number, probes: Float64Array): void;
  /** Adds the law last evaluated, times a weight, to the caller's panel sum (zeroed by `clearPanel`). */
  accumulate(weight: number): void;
  clearPanel(): void;
  /** Adds the panel sum to the total. */
  acceptPanel(): void;
}

/** How far the answer is taken. */
export interface MixtureAccuracy {
  /** Absolute error allowed for each probe over the whole line. */
  readonly absolute: number;
  /** Relative error allowed instead, for small probes. */
  readonly relative: number;
}

/** How the integration went. */
export interface MixtureRecord {
  /** The probes' mixed values. */
  readonly totals: Float64Array;
  /** Sum of the estimated errors of the worst probe. */
  readonly error: number;
  /** Conditional laws worked out. */
  readonly evaluations: number;
}

const DEEPEST = 14;
/** Errors below this are noise of what the recursion trims, not the quadrature's: no panel is halved for them. */
const BELOW_NOTICE = 1e-24;
/** Laws that one mixture may work out; past it the remaining panels are taken as they are and their error is reported. */
const MOST_EVALUATIONS = 30_000;

/** Takes the law at factor zero for the whole mixture: right where nothing depends on the factor. */
export function withoutFactor(family: ConditionalFamily): void {
  family.evaluate(0, new Float64Array(family.probes));
  family.clearPanel();
  family.accumulate(1);
  family.acceptPanel();
}

/** The probes' mixed values to a first approximation, every panel taken once: the size that accuracy is judged by. */
export function surveyProbes(family: ConditionalFamily, boundaries: readonly number[]): Float64Array {
  const values = new Float64Array(family.probes);
  const totals = new Float64Array(family.probes);
  for (let i = 0; i + 1 < boundaries.length; i++) {
    const half = 0.5 * (boundaries[i + 1]! - boundaries[i]!);
    const centre = 0.5 * (boundaries[i + 1]! + boundaries[i]!);
    const panel = new Float64Array(family.probes);
    for (const { node, kronrod } of RULE) {
      const factor = centre + half * node;
      const weight = kronrod * (normalDensity(factor) * half);
      family.evaluate(factor, values);
      for (let k = 0; k < panel.length; k++) panel[k]! += weight * values[k]!;
    }
    for (let k = 0; k < totals.length; k++) totals[k]! += panel[k]!;
  }
  return totals;
}

/**
 * ∫ φ(m) law(m) dm over the panels between `boundaries`, each panel by the Gauss–Kronrod pair of 10 and 21 points
 * (Piessens et al., QUADPACK, 1983) and halved until every probe is settled. The caller adds what lies outside.
 * `expected` gives the probes' likely size, so that the first panels are not held to a standard of their own.
 */
export function mixOverFactor(
  family: ConditionalFamily,
  boundaries: readonly number[],
  accuracy: MixtureAccuracy,
  expected: Float64Array | null,
): MixtureRecord {
  const { probes } = family;
  const values = new Float64Array(probes);
  const kronrod = new Float64Array(probes);
  const gauss = new Float64Array(probes);
  const totals = new Float64Array(probes);
  let error = 0;
  let evaluations = 0;

  const visit = (from: number, to: number, depth: number): void => {
    const half = 0.5 * (to - from);
    const centre = 0.5 * (to + from);
    family.clearPanel();
    kronrod.fill(0);
    gauss.fill(0);
    for (const point of RULE) {
      const factor = centre + half * point.node;
      const density = normalDensity(factor) * half;
      family.evaluate(factor, values);
      evaluations++;
      const weight = point.kronrod * density;
      family.accumulate(weight);
      const gaussWeight = point.gauss * density;
      for (let i = 0; i < probes; i++) {
        kronrod[i]! += weight * values[i]!;
        gauss[i]! += gaussWeight * values[i]!;
      }
    }
    const scale = normalCdf(to) - normalCdf(from);
    let worst = 0;
    let isSettled = true;
    for (let i = 0; i < probes; i++) {
      const estimate = panelError(kronrod[i]!, gauss[i]!, scale);
      const total = Math.max(Math.abs(totals[i]!) + Math.abs(kronrod[i]!), 0.5 * (expected?.[i] ?? 0));
      const allowed = Math.max(Math.min(accuracy.absolute, accuracy.relative * total), total * 1e-15) * 0.1;
      if (estimate > allowed && estimate > BELOW_NOTICE) isSettled = false;
      worst = Math.max(worst, estimate);
    }
    if (isSettled || depth >= DEEPEST || evaluations > MOST_EVALUATIONS) {
      family.acceptPanel();
      for (let i = 0; i < probes; i++) totals[i]! += kronrod[i]!;
      error += worst;
      return;
    }
    visit(from, centre, depth + 1);
    visit(centre, to, depth + 1);
  };

  for (let i = 0; i + 1 < boundaries.length; i++) visit(boundaries[i]!, boundaries[i + 1]!, 0);
  return { totals, error, evaluations };
}

/** QUADPACK's estimate: the difference of the two rules overstates the better one's error by a known power. */
function panelError(kronrod: number, gauss: number, scale: number): number {
  const difference = Math.abs(kronrod - gauss);
  if (difference === 0 || scale <= 0) return difference;
  const spread = Math.max(Math.abs(kronrod), 1e-300);
  const ratio = Math.min(1, (200 * difference) / spread);
  return Math.min(difference, spread * ratio * Math.sqrt(ratio));
}
