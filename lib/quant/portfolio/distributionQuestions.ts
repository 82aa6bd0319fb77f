import type { AmountLaw } from "./lossLaw";

/** The law of the live names' sum of amounts at one date, in the questions a tranche asks of it. */
export interface Distribution {
  /** E[min((X − A)⁺, D − A)]. */
  between(attachment: number, detachment: number): number;
  /** E[min(X, K)] at strikes in rising order. */
  minima(strikes: readonly number[]): Float64Array;
  /** E[min((X − A)⁺, D − A)²]. */
  squareBetween(attachment: number, detachment: number): number;
  above(strike: number): number;
  from(strike: number): number;
  /** Whether P(X > K) and P(X ≥ K) differ. */
  isAtom(strike: number): boolean;
  /** The atoms, or null for a law without (the large pool). */
  readonly atoms: AmountLaw | null;
  /** Whether no grid was used: the large pool, or a large pool's cumulants. */
  readonly isContinuous: boolean;
  /** Smallest amount x with P(X ≤ x) ≥ level. */
  quantile(level: number): number;
  /** Bound on the error of E[min(X, K)] from quadrature. */
  readonly error: number;
}
