import type { PricingReport } from "@/lib/pricing/report";
import type { View } from "./geometry";
import { heightOf } from "./geometry";

/** What of the law is drawn: its mass by loss, or the probability of losing more on a scale of powers of ten. */
export type LawView = "mass" | "tail";

type Law = NonNullable<PricingReport["lossLaw"]>;

/** The step between two losses of a law that has no unit of its own. */
const SMOOTH_STEP = 0.001;

export function stepOf({ unit }: Law): number {
  return unit ?? SMOOTH_STEP;
}

/** The smallest loss whose distribution function reaches the level. */
export function waterLine(law: Law, level: number): number {
  const step = stepOf(law);
  let sum = 0;
  for (const [i, mass] of law.probabilities.entries()) {
    sum += mass;
    if (sum >= level - 1e-12) return i * step;
  }
  return (law.probabilities.length - 1) * step;
}

/** A strip of the law: the probability of losses between two heights of the view. */
export interface Strip {
  readonly y: number;
  readonly height: number;
  readonly mass: number;
}

/** The law as strips of at least `thinnest` pixels from the bottom up, losses beyond the view left out. */
export function stripsOf(law: Law, view: View, thinnest = 3): Strip[] {
  const step = stepOf(law);
  const perStrip = Math.max(1, Math.ceil((thinnest * view.reach) / (step * view.height)));
  const last = Math.min(law.probabilities.length - 1, Math.floor(view.reach / step + 1e-9));
  const strips: Strip[] = [];
  for (let first = 0; first <= last; first += perStrip) {
    let mass = 0;
    for (let i = first; i < first + perStrip && i <= last; i++) mass += law.probabilities[i]!;
    const bottom = heightOf(first * step, view);
    const top = heightOf((first + perStrip) * step, view);
    strips.push({ y: top, height: Math.max(1, bottom - top), mass });
  }
  return strips;
}

/** P(loss > K) at losses up to the reach, thinned to about one point a pixel, down to where it falls below `least`. */
export function tailOf(law: Law, view: View, least = 1e-9): { loss: number; probability: number }[] {
  const step = stepOf(law);
  const sums: number[] = new Array(law.probabilities.length + 1).fill(0);
  for (let i = law.probabilities.length - 1; i >= 0; i--) sums[i] = sums[i + 1]! + law.probabilities[i]!;
  const last = Math.min(law.probabilities.length - 1, Math.floor(view.reach / step + 1e-9));
  const stride = Math.max(1, Math.floor(view.reach / step / view.height));
  const points = [];
  for (let i = 0; i <= last; i += stride) {
    const probability = sums[i + 1]!;
    if (probability < least) break;
    points.push({ loss: i * step, probability });
  }
  return points;
}
