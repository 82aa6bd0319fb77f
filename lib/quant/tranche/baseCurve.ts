import {
  type Knots,
  linearInterpolation,
  monotoneInterpolation,
  monotoneSlopes,
} from "../maths/interpolation";

/** A base correlation at a strike. */
export interface BaseNode {
  readonly strike: number;
  readonly rho: number;
}

/** How a base curve is read between and beyond its nodes. */
export interface BaseReading {
  readonly interpolation: "linear" | "monotone";
  readonly beyond: "flat" | "linear";
}

/** Highest correlation that a chord beyond the quoted strikes may reach. */
const HIGHEST = 0.9999;

/**
 * ρ(K) from nodes in rising order of strike: linear or monotone cubic between them, outside flat or along the chord of
 * the last interval, clamped to [0, 0.9999].
 */
export function baseCurve(nodes: readonly BaseNode[], reading: BaseReading): (strike: number) => number {
  const knots: Knots = { arguments: nodes.map((node) => node.strike), values: nodes.map((node) => node.rho) };
  const slopes = monotoneSlopes(knots);
  const count = nodes.length;
  return (strike) => {
    const first = nodes[0]!;
    const last = nodes[count - 1]!;
    if (strike < first.strike || strike > last.strike) {
      if (reading.beyond === "flat" || count === 1) return strike < first.strike ? first.rho : last.rho;
      const [one, other] = strike < first.strike ? [first, nodes[1]!] : [nodes[count - 2]!, last];
      const chord = one.rho + ((other.rho - one.rho) * (strike - one.strike)) / (other.strike - one.strike);
      return Math.min(Math.max(chord, 0), HIGHEST);
    }
    return reading.interpolation === "linear"
      ? linearInterpolation(knots, strike)
      : monotoneInterpolation(knots, strike, slopes);
  };
}
