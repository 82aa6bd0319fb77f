import { normalCdf, normalDensity } from "../maths/normal";
import type { FactorNames } from "./factorNames";

const HIGHEST_FACTOR = 12.5;
const WIDEST_PANEL = 4;
/** Beyond this many widths from its transition a name's default is settled either way. */
const SETTLED = 9;
const MOST_PANELS = 4_000;
/** Narrowest first panel, in widths of the steepest name's transition: where both ends of all names are settled the ratio of deviation to slope says nothing. */
const NARROWEST = 0.4;

/**
 * The factor value above which the conditional law is "no default" to within a mass of 1e-20: there it is settled and
 * goes into the total in closed form.
 */
export function settledFrom(names: FactorNames): number {
  const { thresholds, loadings } = names;
  for (let factor = -8; factor < HIGHEST_FACTOR; factor += 0.5) {
    let defaults = 0;
    for (let i = 0; i < thresholds.length; i++) {
      const loading = loadings[i]!;
      defaults +=
        loading < 0
          ? 1
          : normalCdf((thresholds[i]! - loading * factor) / Math.sqrt((1 - loading) * (1 + loading)));
    }
    if (defaults * normalCdf(-factor) < 1e-20 && defaults < 1e-12) return factor;
  }
  return HIGHEST_FACTOR;
}

/**
 * Panel boundaries on [low, high] fitted to the names: a panel is no wider than a few times the factor distance over
 * which the conditional mean moves by its own deviation, nor than the distance to the nearest name's transition.
 */
export function panelBoundaries(
  sizes: readonly number[],
  names: FactorNames,
  low: number,
  high: number,
): number[] {
  const boundaries = [low];
  let at = low;
  while (at < high && boundaries.length < MOST_PANELS) {
    const first = panelWidth(names, sizes, at);
    const width = Math.min(first, panelWidth(names, sizes, at + first), WIDEST_PANEL);
    at = high - at < 1.4 * width ? high : at + width;
    boundaries.push(at);
  }
  if (at < high) boundaries.push(high);
  return boundaries;
}

function panelWidth({ thresholds, loadings }: FactorNames, sizes: readonly number[], factor: number): number {
  let variance = 0;
  let slope = 0;
  let nearest = WIDEST_PANEL;
  let steepest = 0;
  for (let i = 0; i < thresholds.length; i++) {
    const loading = loadings[i]!;
    const threshold = thresholds[i]!;
    if (loading === 0 || !Number.isFinite(threshold)) continue;
    const scale = Math.sqrt((1 - loading) * (1 + loading));
    const x = (threshold - loading * factor) / scale;
    const steepness = Math.abs(loading) / scale;
    steepest = Math.max(steepest, steepness);
    nearest = Math.min(nearest, (1.5 + 0.5 * Math.abs(x)) / steepness);
    if (Math.abs(x) > SETTLED) continue;
    const size = sizes[i]!;
    const probability = normalCdf(x);
    variance += size * size * probability * normalCdf(-x);
    slope += size * normalDensity(x) * steepness;
  }
  const fluctuation = slope > 0 && variance > 0 ? (6 * Math.sqrt(variance)) / slope : WIDEST_PANEL;
  return Math.min(nearest, Math.max(fluctuation, NARROWEST / Math.max(steepest, 1e-3)));
}
