import { normalCdf, normalDensity } from "../maths/normal";

/** Mean, deviation, skewness and excess kurtosis of a sum of many independent amounts. */
export interface SumShape {
  readonly mean: number;
  readonly deviation: number;
  readonly skewness: number;
  readonly kurtosis: number;
}

/** What a sum does above a strike. */
export interface AboveStrike {
  /** P(X > K), E[(X − K)⁺] and E[((X − K)⁺)²]. */
  readonly probability: number;
  readonly excess: number;
  readonly square: number;
  /** Density at the strike. */
  readonly density: number;
  /** The first terms left out of the excess, the fifth cumulant taken as a Poisson sum's: they change sign with the strike. */
  readonly leftOut: number;
}

/** Beyond this many deviations nothing is left that a weight could show. */
const FAR = 12;
const NOTHING: AboveStrike = { probability: 0, excess: 0, square: 0, density: 0, leftOut: 0 };

/**
 * A sum near the normal law above a strike, by Edgeworth's expansion to the fourth cumulant (Kolassa, Series Approximation
 * Methods in Statistics, 2006, ch. 3), integrated once and twice: ∫ φ Heₙ = −φ Heₙ₋₁.
 */
export function aboveStrike({ mean, deviation, skewness, kurtosis }: SumShape, strike: number): AboveStrike {
  if (deviation < 1e-12) {
    const excess = Math.max(0, mean - strike);
    return { probability: mean > strike ? 1 : 0, excess, square: excess * excess, density: 0, leftOut: 0 };
  }
  const z = (strike - mean) / deviation;
  if (z > FAR) return NOTHING;
  const density = normalDensity(z);
  const tail = normalCdf(-z);
  const square = z * z;
  const three = skewness / 6;
  const four = kurtosis / 24;
  const twiceThree = (skewness * skewness) / 72;
  const cubic = z * (square - 3);
  const quartic = square * (square - 6) + 3;
  const quintic = z * (square * (square - 10) + 15);
  const septic = z * (square * (square * (square - 21) + 105) - 105);
  const correction = {
    probability: three * (square - 1) + four * cubic + twiceThree * quintic,
    excess: three * z + four * (square - 1) + twiceThree * quartic,
    square: three + four * z + twiceThree * cubic,
  };
  const mixed = skewness * kurtosis;
  const next = mixed * (cubic / 120 + quintic / 144) + (skewness ** 3 * septic) / 1296;
  return {
    probability: tail + density * correction.probability,
    excess: deviation * (density - z * tail + density * correction.excess),
    square: deviation * deviation * ((1 + square) * tail - z * density + 2 * density * correction.square),
    density: density / deviation,
    leftOut: deviation * density * next,
  };
}
