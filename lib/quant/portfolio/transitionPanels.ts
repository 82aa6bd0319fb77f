import type { ConditionalMoments, Recursion } from "../kernel/recursion";

/** Panel width in units of the factor distance over which the conditional mean moves by its own deviation. */
const WIDTHS = 6;
const WIDEST = 4;
const NARROWEST = 0.02;

/** First panel boundaries on [low, high]: each panel as wide as sixteen points carry at the local pace of the law. */
export function transitionPanels(recursion: Recursion, low: number, high: number): number[] {
  const boundaries = [low];
  let at = low;
  while (at < high) {
    let width = Math.min(WIDEST, high - at);
    for (;;) {
      const [one, other] = recursion.momentsAt(at + 0.5 * width, at + width);
      if (width <= NARROWEST || width <= 1.1 * Math.min(paceWidth(one), paceWidth(other))) break;
      width *= 0.75;
    }
    at = high - at < 1.25 * width ? high : at + width;
    boundaries.push(at);
  }
  return boundaries;
}

function paceWidth({ variance, slope }: ConditionalMoments): number {
  const pace = Math.abs(slope);
  return pace > 0 ? Math.min(WIDEST, (WIDTHS * Math.sqrt(variance)) / pace) : WIDEST;
}
