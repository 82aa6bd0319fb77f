import { PANEL_POINTS, type PanelLaw, type Recursion } from "../kernel/recursion";
import { normalDensity } from "../maths/normal";
import { gaussLegendre } from "../maths/quadrature";
import { legendreError, legendreProbe } from "./legendreError";

/** How far a mixture is taken: errors allowed in each probe, absolute and relative to its size (the smaller counts). */
export interface PanelAccuracy {
  readonly absolute: number;
  readonly relative: number;
}

/** What a mixture over the factor is judged by, in grid steps. */
export interface Probes {
  /** Strikes ascending; the recursion's breaks are 0 and their ceilings. */
  readonly strikes: readonly number[];
  /** At how many of the strikes, from the lowest, P(X > K) is a probe beside E[min(X, K)]. */
  readonly tails: number;
  /** E[min(X, K)] counts in steps times this. */
  readonly unit: number;
  readonly accuracy: PanelAccuracy;
  /** E[X] over the interval, what lies above the top included: it is known, and must come out of the mixture. */
  readonly mean: number | null;
  /** Sizes below which probes are not held to the relative standard. */
  readonly floor: number;
}

/** The mixed law: masses at steps 0.., what lies above the top, and the estimated error of the worst E[min(X, K)]. */
export interface MixedLaw {
  readonly masses: Float64Array;
  overflow: number;
  /** Σ step · mass above the top. */
  readonly overflowMoment: number;
  readonly error: number;
  readonly evaluations: number;
}

interface Panel {
  readonly from: number;
  readonly to: number;
  readonly depth: number;
  readonly law: PanelLaw;
  readonly values: Float64Array;
  readonly errors: Float64Array;
}

const RULE = gaussLegendre(PANEL_POINTS);
const PROBE = legendreProbe(PANEL_POINTS);
const DEEPEST = 14;
const MOST_PANELS = 2_000;
/** The mean is met to this, if need be by holding panels to a stricter standard, down to the strictest. */
const MEAN_ERROR = 5e-13;
const STRICTEST = 1e-6;
/** Errors below this are noise of what the recursion drops. */
const BELOW_NOTICE = 1e-22;

/**
 * ∫ φ(m) law(m) dm over the panels between `boundaries`, each by sixteen Gauss–Legendre points and halved where the
 * probes' own Legendre coefficients say that it is not settled.
 */
export function mixedLaw(
  recursion: Recursion,
  top: number,
  boundaries: readonly number[],
  probes: Probes,
): MixedLaw {
  let panels = boundaries.slice(1).map((to, i) => panelOf(recursion, top, boundaries[i]!, to, 0, probes));
  let evaluations = panels.length * PANEL_POINTS;
  let standard = 0.1;
  for (;;) {
    const allowed = allowedErrors(panels, probes, standard);
    const isRough = (panel: Panel) =>
      panel.depth < DEEPEST && panel.errors.some((error, i) => error > allowed[i]! && error > BELOW_NOTICE);
    const rough = new Set(panels.filter(isRough));
    if (panels.length + rough.size > MOST_PANELS) break;
    if (rough.size === 0) {
      if (standard < STRICTEST || missesMean(panels, probes) <= MEAN_ERROR) break;
      standard *= 0.1;
      continue;
    }
    evaluations += 2 * rough.size * PANEL_POINTS;
    panels = panels.flatMap((panel) => (rough.has(panel) ? halves(recursion, top, panel, probes) : [panel]));
  }
  return { ...summed(panels, top), error: worstError(panels, probes), evaluations };
}

function halves(recursion: Recursion, top: number, { from, to, depth }: Panel, probes: Probes): Panel[] {
  const centre = 0.5 * (from + to);
  return [
    panelOf(recursion, top, from, centre, depth + 1, probes),
    panelOf(recursion, top, centre, to, depth + 1, probes),
  ];
}

function panelOf(
  recursion: Recursion,
  top: number,
  from: number,
  to: number,
  depth: number,
  probes: Probes,
): Panel {
  const half = 0.5 * (to - from);
  const centre = 0.5 * (to + from);
  const factors = RULE.nodes.map((node) => centre + half * node);
  const weights = RULE.weights.map((weight, k) => weight * half * normalDensity(factors[k]!));
  const law = recursion.panel(factors, weights);
  return { from, to, depth, law, ...probeValues(law, top, probes) };
}

/** Each probe's sum over the panel, and its estimated error: E[min] at the strikes, the tails, the mean. */
function probeValues(law: PanelLaw, top: number, { mean, strikes, tails, unit }: Probes) {
  const count = strikes.length;
  const values = new Float64Array(count + tails + (mean === null ? 0 : 1));
  const errors = new Float64Array(values.length);
  const above = law.overflow.slice();
  const minimum = new Float64Array(PANEL_POINTS);
  for (let i = count - 1; i >= 0; i--) {
    const strike = Math.min(strikes[i]!, top);
    for (let k = 0; k < PANEL_POINTS; k++) {
      above[k]! += law.segmentMasses[(i + 1) * PANEL_POINTS + k]!;
      let below = 0;
      for (let segment = 0; segment <= i; segment++) below += law.segmentMoments[segment * PANEL_POINTS + k]!;
      minimum[k] = unit * (below + strike * above[k]!);
    }
    values[i] = minimum.reduce((sum, term) => sum + term, 0);
    errors[i] = legendreError(minimum, PROBE);
    if (i >= tails) continue;
    values[count + i] = above.reduce((sum, term) => sum + term, 0);
    errors[count + i] = legendreError(above, PROBE);
  }
  if (mean !== null) {
    const all = law.overflowMoments.map((above, k) => unit * (above + segmentSum(law.segmentMoments, k)));
    values[count + tails] = all.reduce((sum, term) => sum + term, 0);
    errors[count + tails] = legendreError(all, PROBE);
  }
  return { values, errors };
}

function segmentSum(segments: Float64Array, k: number): number {
  let sum = 0;
  for (let i = k; i < segments.length; i += PANEL_POINTS) sum += segments[i]!;
  return sum;
}

/** How far the mixture's mean lies from the one that is known. */
function missesMean(panels: readonly Panel[], { mean }: Probes): number {
  if (mean === null) return 0;
  return Math.abs(panels.reduce((sum, { values }) => sum + values[values.length - 1]!, 0) - mean);
}

function allowedErrors(
  panels: readonly Panel[],
  { accuracy, floor }: Probes,
  standard: number,
): Float64Array {
  const totals = new Float64Array(panels[0]?.values.length ?? 0);
  for (const { values } of panels) for (let i = 0; i < totals.length; i++) totals[i]! += Math.abs(values[i]!);
  return totals.map((total) => {
    const size = Math.max(total, floor);
    return standard * Math.max(Math.min(accuracy.absolute, accuracy.relative * size), 1e-15 * size);
  });
}

function worstError(panels: readonly Panel[], { strikes }: Probes): number {
  let worst = 0;
  for (let i = 0; i < strikes.length; i++)
    worst = Math.max(
      worst,
      panels.reduce((sum, { errors }) => sum + errors[i]!, 0),
    );
  return worst;
}

function summed(panels: readonly Panel[], top: number) {
  const masses = new Float64Array(top + 1);
  let overflow = 0;
  let overflowMoment = 0;
  for (const { law } of panels) {
    for (let k = 0; k < law.masses.length; k++) masses[law.low + k]! += law.masses[k]!;
    for (const part of law.overflow) overflow += part;
    for (const part of law.overflowMoments) overflowMoment += part;
  }
  return { masses, overflow, overflowMoment };
}
