/** Weight and grid step of one landing point of a name's amount. */
export interface GridShare {
  /** Whole steps of the first landing point. */
  readonly steps: number;
  /** Weights of the landing points steps, steps + 1, steps + 2: they keep mean (and, for three, variance). */
  readonly weights: readonly number[];
}

/** A grid of width `unit` on which amounts (fractions of the pool's notional) are laid. */
export interface AmountGrid {
  readonly unit: number;
  /** Every amount is a whole number of units: the grid's law is the exact law. */
  readonly isExact: boolean;
  readonly shares: readonly GridShare[];
  /** The largest sum the names can reach, in steps. */
  readonly top: number;
  /** The shares as flat arrays for the recursion: whole steps, three landing weights a name, amounts in steps. */
  readonly steps: Int32Array;
  readonly weights: Float64Array;
  readonly sizes: Float64Array;
}

/** An exact lattice may have at most this many steps (and names × steps at most WORKABLE_WORK). */
const WORKABLE_STEPS = 40_000;
const WORKABLE_WORK = 1_250_000;
/** Relative error of an amount that decimal input leaves in binary. */
const DECIMAL_NOISE = 4e-14;

/**
 * The unit of which all amounts are whole multiples, or null when there is none of workable size. Amounts come from
 * decimal input, so a common divisor is sought by Euclid's algorithm with the noise of binary rounding allowed for.
 */
export function exactUnit(amounts: readonly number[]): number | null {
  const positive = amounts.filter((amount) => amount > 0);
  if (positive.length === 0) return null;
  const total = positive.reduce((sum, amount) => sum + amount, 0);
  const most = Math.max(1, Math.min(WORKABLE_STEPS, WORKABLE_WORK / positive.length));
  const floor = total / most;
  let divisor = 0;
  for (const amount of positive) {
    divisor = commonDivisor(amount, divisor, floor, total * 1e-11);
    if (divisor < floor) return null;
  }
  return refinedUnit(positive, divisor, total);
}

function commonDivisor(one: number, other: number, floor: number, noise: number): number {
  let a = Math.max(one, other);
  let b = Math.min(one, other);
  while (b > noise) {
    if (b < floor) return 0;
    const rest = a - Math.round(a / b) * b;
    a = b;
    b = Math.abs(rest);
  }
  return a;
}

/** The divisor corrected by the total, when every amount is then a multiple within the decimal noise. */
function refinedUnit(amounts: readonly number[], divisor: number, total: number): number | null {
  const steps = amounts.reduce((sum, amount) => sum + Math.round(amount / divisor), 0);
  const unit = total / steps;
  const fits = amounts.every(
    (amount) => Math.abs(amount - Math.round(amount / unit) * unit) <= DECIMAL_NOISE * total,
  );
  return fits ? unit : null;
}

/**
 * Units of a shared grid: 1e-5 for a handful of names, whose law has kinks at every sum, up to 1e-4 for 125, whose law has
 * enough sums to be smooth; beyond 800 names it may grow again, as single amounts become small beside any strike.
 */
const FINEST_UNIT = 1e-5;
const UNIT_A_NAME = 8e-7;
const PLENTIFUL_UNIT = 1e-4;
const UNIT_A_NAME_OF_MANY = 1.25e-7;
const COARSEST_UNIT = 4e-4;

/**
 * The grid for amounts: the exact lattice when there is one, else a shared grid that has the largest amount on a
 * grid point; a unit imposed by the caller is taken as it is.
 * @param landingPoints 2 keeps the mean and non-negative weights, 3 keeps the variance too.
 */
export function amountGrid(
  amounts: readonly number[],
  landingPoints: 2 | 3,
  imposedUnit?: number,
): AmountGrid {
  const exact = imposedUnit === undefined ? exactUnit(amounts) : null;
  const unit = imposedUnit ?? exact ?? sharedUnit(amounts);
  const shares = amounts.map((amount) => gridShare(amount / unit, landingPoints));
  return gridOfShares(unit, shares);
}

/** The grid of a selection of shares. */
export function gridOfShares(unit: number, shares: readonly GridShare[]): AmountGrid {
  return {
    unit,
    isExact: shares.every((share) => share.weights.length === 1),
    shares,
    top: shares.reduce((sum, share) => sum + share.steps + share.weights.length - 1, 0),
    steps: Int32Array.from(shares, (share) => share.steps),
    weights: Float64Array.from(shares.flatMap(({ weights }) => [0, 1, 2].map((k) => weights[k] ?? 0))),
    sizes: Float64Array.from(shares, (share) =>
      share.weights.reduce((sum, weight, k) => sum + k * weight, share.steps),
    ),
  };
}

function sharedUnit(amounts: readonly number[]): number {
  const largest = Math.max(...amounts);
  if (largest === 0) return 1;
  const few = Math.min(PLENTIFUL_UNIT, Math.max(FINEST_UNIT, UNIT_A_NAME * amounts.length));
  const wanted = Math.min(COARSEST_UNIT, Math.max(few, UNIT_A_NAME_OF_MANY * amounts.length));
  return largest / Math.ceil(largest / wanted);
}

function gridShare(position: number, landingPoints: 2 | 3): GridShare {
  const nearest = Math.round(position);
  if (Math.abs(position - nearest) <= 1e-9 * Math.max(1, position)) return { steps: nearest, weights: [1] };
  const lower = Math.floor(position);
  const fraction = position - lower;
  if (landingPoints === 2) return { steps: lower, weights: [1 - fraction, fraction] };
  const centre = nearest === 0 ? 1 : nearest;
  const offset = position - centre;
  return {
    steps: centre - 1,
    weights: [(offset * offset - offset) / 2, 1 - offset * offset, (offset * offset + offset) / 2],
  };
}
