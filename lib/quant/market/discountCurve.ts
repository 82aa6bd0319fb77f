import { exp } from "../maths/elementary";
import { brentRoot } from "../maths/roots";
import { failure, type Outcome, success } from "../outcome";

/** How a discount curve is given; rates are decimals, continuously compounded except par swap rates (annual). */
export type DiscountInput =
  | { readonly kind: "flat"; readonly rate: number }
  | {
      readonly kind: "zero" | "par";
      readonly nodes: readonly { readonly years: number; readonly rate: number }[];
    };

/** ln DF at nodes, linear in time between them (piecewise constant forwards), forwards flat beyond the last; DF(0) = 1. */
export interface DiscountCurve {
  /** Node times in years, ascending, above zero. */
  readonly times: readonly number[];
  /** −ln DF at the nodes. */
  readonly negativeLogs: readonly number[];
  /** Forward rate on the piece that ends at each node; the last one holds beyond too. */
  readonly forwards: readonly number[];
}

/**
 * Builds a discount curve. Par nodes are bootstrapped in order: annual fixed payments at whole years, years between
 * two nodes read off the same interpolation.
 * Problems: a par rate for which no positive discount factor exists, a discount factor that is not finite and positive.
 */
export function discountCurve(input: DiscountInput): Outcome<DiscountCurve> {
  if (input.kind === "flat") return checked([1], [input.rate]);
  const times = input.nodes.map((node) => node.years);
  if (input.kind === "zero")
    return checked(
      times,
      input.nodes.map((node) => node.rate * node.years),
    );
  return bootstrapPar(input.nodes);
}

function bootstrapPar(nodes: readonly { years: number; rate: number }[]): Outcome<DiscountCurve> {
  const times: number[] = [];
  const logs: number[] = [];
  let annuity = 0;
  for (const [i, { years, rate }] of nodes.entries()) {
    const from = times[i - 1] ?? 0;
    const base = logs[i - 1] ?? 0;
    const miss = (forward: number) => {
      let sum = annuity;
      for (let year = from + 1; year <= years; year++) sum += exp(-(base + forward * (year - from)));
      return rate * sum + exp(-(base + forward * (years - from))) - 1;
    };
    const bracket = parBracket(miss);
    if (!bracket) {
      return failure(
        "parRate",
        `nodes.${i}.rate`,
        `no positive discount factor meets the par rate at ${years} years`,
        rate,
      );
    }
    const forward = brentRoot(miss, bracket[0], bracket[1]);
    for (let year = from + 1; year <= years; year++) annuity += exp(-(base + forward * (year - from)));
    times.push(years);
    logs.push(base + forward * (years - from));
  }
  return checked(times, logs);
}

/** An interval of forward rates on which the par condition changes sign, or null. */
function parBracket(miss: (forward: number) => number): [number, number] | null {
  for (const bound of [0.1, 0.5, 2, 10]) {
    if (miss(-bound) > 0 && miss(bound) < 0) return [-bound, bound];
  }
  return null;
}

function checked(times: readonly number[], negativeLogs: readonly number[]): Outcome<DiscountCurve> {
  for (const [i, value] of negativeLogs.entries()) {
    if (!(Math.abs(value) < 700)) {
      return failure(
        "discountFactor",
        times.length > 1 ? `nodes.${i}.rate` : "rate",
        "the discount factor must be finite and positive",
        value,
      );
    }
  }
  const forwards = negativeLogs.map(
    (value, i) => (value - (negativeLogs[i - 1] ?? 0)) / (times[i]! - (times[i - 1] ?? 0)),
  );
  return success({ times, negativeLogs, forwards });
}

/** −ln DF(t) for t ≥ 0 in years. */
export function negativeLogDiscount(curve: DiscountCurve, t: number): number {
  const { times, negativeLogs, forwards } = curve;
  let i = 0;
  while (i < times.length && times[i]! < t) i++;
  if (i < times.length && times[i] === t) return negativeLogs[i]!;
  const piece = Math.min(i, times.length - 1);
  return (negativeLogs[i - 1] ?? 0) + forwards[piece]! * (t - (times[i - 1] ?? 0));
}

/** Discount factor at t ≥ 0 in years. */
export function discountFactor(curve: DiscountCurve, t: number): number {
  return exp(-negativeLogDiscount(curve, t));
}

/** The curve with every continuously compounded zero rate moved by `shift`, its own nodes kept. */
export function shiftZeroRates(curve: DiscountCurve, shift: number): DiscountCurve {
  return {
    times: curve.times,
    negativeLogs: curve.negativeLogs.map((value, i) => value + shift * curve.times[i]!),
    forwards: curve.forwards.map((forward) => forward + shift),
  };
}

/** Continuously compounded zero rate at t > 0. */
export function zeroRate(curve: DiscountCurve, t: number): number {
  return negativeLogDiscount(curve, t) / t;
}
