/**
 * The law of a sum of default amounts at one date, as atoms in ascending order. Amounts are fractions of the pool's
 * initial notional; what was realised before the start is not in it.
 */
export interface AmountLaw {
  readonly amounts: Float64Array;
  readonly masses: Float64Array;
  /** Mass beyond the last atom, when the law was cut above the strikes of interest; 0 for a whole law. */
  readonly overflow: number;
  /** Bound on the error of E[min(X, K)] from mixing over the factor. */
  readonly error: number;
}

/** A strike within this of an atom is at the atom: decimal strikes and lattice points differ in the last bits. */
const SAME = 1e-11;

/** E[min(X, K)]; K must lie within the law's atoms when the law was cut. */
export function expectedMinimum(law: AmountLaw, strike: number): number {
  if (strike <= 0) return 0;
  const { amounts, masses } = law;
  let below = 0;
  let above = law.overflow;
  for (let i = amounts.length - 1; i >= 0; i--) {
    const amount = amounts[i]!;
    if (amount >= strike) above += masses[i]!;
    else below += amount * masses[i]!;
  }
  return below + strike * above;
}

/** E[min(X, K)] at strikes in rising order, in one pass over the law. */
export function expectedMinima(law: AmountLaw, strikes: readonly number[]): Float64Array {
  const { amounts, masses } = law;
  const values = new Float64Array(strikes.length);
  let above = law.overflow;
  for (const mass of masses) above += mass;
  let below = 0;
  let i = 0;
  for (const [k, strike] of strikes.entries()) {
    for (; i < amounts.length && amounts[i]! < strike; i++) {
      below += amounts[i]! * masses[i]!;
      above -= masses[i]!;
    }
    values[k] = strike <= 0 ? 0 : below + strike * above;
  }
  return values;
}

/** E[min((X − A)⁺, D − A)] summed from positive terms, so that a far tail keeps its digits. */
export function expectedBetween(law: AmountLaw, attachment: number, detachment: number): number {
  const { amounts, masses } = law;
  let sum = (detachment - attachment) * law.overflow;
  for (let i = amounts.length - 1; i >= 0; i--) {
    const amount = amounts[i]!;
    if (amount <= attachment) break;
    sum += (Math.min(amount, detachment) - attachment) * masses[i]!;
  }
  return sum;
}

/** E[min((X − A)⁺, D − A)²]. */
export function expectedSquareBetween(law: AmountLaw, attachment: number, detachment: number): number {
  const { amounts, masses } = law;
  const width = detachment - attachment;
  let sum = width * width * law.overflow;
  for (let i = amounts.length - 1; i >= 0; i--) {
    const amount = amounts[i]!;
    if (amount <= attachment) break;
    const part = Math.min(amount, detachment) - attachment;
    sum += part * part * masses[i]!;
  }
  return sum;
}

/** P(X > K). */
export function probabilityAbove(law: AmountLaw, strike: number): number {
  return tail(law, strike + SAME);
}

/** P(X ≥ K). */
export function probabilityFrom(law: AmountLaw, strike: number): number {
  return tail(law, strike - SAME);
}

/** Whether the strike is one of the law's atoms, where > and ≥ differ. */
export function isAtom(law: AmountLaw, strike: number): boolean {
  return probabilityFrom(law, strike) !== probabilityAbove(law, strike);
}

function tail(law: AmountLaw, from: number): number {
  const { amounts, masses } = law;
  let sum = law.overflow;
  for (let i = amounts.length - 1; i >= 0 && amounts[i]! > from; i--) sum += masses[i]!;
  return sum;
}
