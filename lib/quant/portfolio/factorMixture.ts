import { PANEL_POINTS, type PanelLaw, type Recursion } from "../kernel/recursion";
import { legendreError, legendreProbe } from "./legendreError";
import { type JudgedPanel, type PanelAccuracy, settledPanels } from "./settledPanels";

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

interface LawPanel extends JudgedPanel {
  readonly law: PanelLaw;
}

const PROBE = legendreProbe(PANEL_POINTS);

/** ∫ φ(m) law(m) dm over the panels between `boundaries`. */
export function mixedLaw(
  recursion: Recursion,
  top: number,
  boundaries: readonly number[],
  probes: Probes,
): MixedLaw {
  let evaluations = 0;
  const { accuracy, floor, mean } = probes;
  const panels = settledPanels(boundaries, { accuracy, floor, known: mean }, (factors, weights): LawPanel => {
    evaluations += PANEL_POINTS;
    const law = recursion.panel(factors, weights);
    return { law, ...probeValues(law, top, probes) };
  });
  return { ...summed(panels, top), error: worstError(panels, probes), evaluations };
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

function worstError(panels: readonly LawPanel[], { strikes }: Probes): number {
  let worst = 0;
  for (let i = 0; i < strikes.length; i++)
    worst = Math.max(
      worst,
      panels.reduce((sum, { errors }) => sum + errors[i]!, 0),
    );
  return worst;
}

function summed(panels: readonly LawPanel[], top: number) {
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
