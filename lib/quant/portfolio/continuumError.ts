import { cosinePi } from "../maths/chebyshev";
import { exp } from "../maths/elementary";

/** Frequencies looked at, in turns of the mean amount, and how finely: a step turns a large amount by a quarter radian. */
const LOWEST_TURN = 0.5;
const HIGHEST_TURN = 6;
const RADIANS = 0.5;
const LARGE = 0.9;
/** A peak may lie between two frequencies looked at. */
const UNSEEN = 2;

/**
 * By how much taking amounts as a continuum falls short of what it would err by if all amounts were the mean one: 1 for a
 * lattice, small for mixed amounts. A sum's distribution differs from its smooth expansion by what is left of its
 * characteristic function at high frequencies, here bounded by exp(−Σ p (1 − p)(1 − cos tl)), over the frequency squared.
 * Amounts ascending.
 */
export function coherence(amounts: Float64Array, probabilities: Float64Array): number {
  const count = amounts.length;
  const mean = amounts.reduce((sum, amount) => sum + amount, 0) / count;
  const large = Math.max(mean, amounts[Math.floor(LARGE * (count - 1))]!);
  const stepTurn = (RADIANS * mean) / (2 * Math.PI * large);
  const turns = Math.ceil((HIGHEST_TURN - LOWEST_TURN) / stepTurn);
  const cosines = amounts.map((amount) => cosine((2 * LOWEST_TURN * amount) / mean));
  const sines = amounts.map((amount) => cosine((2 * LOWEST_TURN * amount) / mean - 0.5));
  const stepCosines = amounts.map((amount) => cosine((2 * stepTurn * amount) / mean));
  const stepSines = amounts.map((amount) => cosine((2 * stepTurn * amount) / mean - 0.5));
  const spreads = probabilities.map((p) => p * (1 - p));
  let worst = 1 / (HIGHEST_TURN * HIGHEST_TURN);
  for (let step = 0; step <= turns; step++) {
    let decay = 0;
    for (let i = 0; i < count; i++) {
      const real = cosines[i]!;
      const imaginary = sines[i]!;
      decay += spreads[i]! * (1 - real);
      cosines[i] = real * stepCosines[i]! - imaginary * stepSines[i]!;
      sines[i] = real * stepSines[i]! + imaginary * stepCosines[i]!;
    }
    const turn = LOWEST_TURN + step * stepTurn;
    worst = Math.max(worst, exp(-decay) / (turn * turn));
  }
  return Math.min(1, UNSEEN * worst);
}

/** cos(πu) for any u. */
function cosine(u: number): number {
  const folded = Math.abs(u) % 2;
  return cosinePi(folded <= 1 ? folded : 2 - folded);
}
