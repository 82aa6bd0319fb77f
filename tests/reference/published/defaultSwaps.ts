import { swapLegs } from "@/lib/quant/market/defaultSwap";
import { type DiscountCurve, discountCurve, discountFactor } from "@/lib/quant/market/discountCurve";
import { evenSchedule } from "@/lib/quant/market/schedule";
import {
  cumulativeDefault,
  cumulativeHazard,
  defaultProbability,
  flatHazard,
  type SurvivalCurve,
  survivalProbability,
} from "@/lib/quant/market/survivalCurve";
import { brentRoot } from "@/lib/quant/maths/roots";
import { parSpread, upfrontAt } from "@/lib/quant/tranche/legs";
import { type Check, input, inputs, type Published } from "./check";
import { breakEven, evenTimes, flatCurve, type PrintedLegs, printedLegs } from "./legs";

interface TextbookSwap {
  readonly hazard: number;
  readonly recovery: number;
  readonly rate: number;
  readonly perYear: number;
}

/** A five-year default swap as Hull prints it: defaults in the middle of a payment period. */
function textbookSwap({ hazard, recovery, rate, perYear }: TextbookSwap): PrintedLegs {
  const curve = flatHazard(hazard);
  const times = Array.from({ length: 5 * perYear + 1 }, (_, j) => j / perYear);
  return printedLegs(
    evenTimes(5, perYear, rate),
    times.map((t) => (1 - recovery) * defaultProbability(curve, t)),
    times.map((t) => survivalProbability(curve, t)),
  );
}

/** The hazard at which the textbook swap breaks even at a spread. */
export function textbookHazard(spread: number, swap: Omit<TextbookSwap, "hazard">): number {
  return brentRoot((hazard) => breakEven(textbookSwap({ ...swap, hazard })) - spread, 1e-6, 1);
}

const hullSwap: TextbookSwap = { hazard: 0.02, recovery: 0.4, rate: 0.05, perYear: 1 };

/** The tenors of a figure with what is printed beside each. */
export interface PrintedTenor {
  readonly years: number;
  readonly spread: number;
  readonly hazard: number;
}

/** Tenors, spreads and hazards of a figure, as decimals. */
export function printedTenors(entry: Published): PrintedTenor[] {
  const hazards = inputs(entry, "hazard_pct");
  const spreads = inputs(entry, "spread_bp");
  return inputs(entry, "terms").map((years, i) => ({
    years,
    spread: spreads[i]! / 1e4,
    hazard: hazards[i]! / 100,
  }));
}

/** Survival curve with the hazards printed between the tenors of a figure. */
function printedCurve(entry: Published): SurvivalCurve {
  const tenors = printedTenors(entry);
  let sum = 0;
  const cumulative = tenors.map(({ years, hazard }, i) => {
    sum += hazard * (years - (tenors[i - 1]?.years ?? 0));
    return sum;
  });
  return { times: tenors.map(({ years }) => years), cumulative, defaulted: false };
}

/** Zero rates at the tenors of the figure at which the core's annuities are the printed ones: the source prints no curve. */
export function fittedDiscount(entry: Published, survival = printedCurve(entry)): DiscountCurve {
  const nodes: { years: number; rate: number }[] = [];
  for (const [i, years] of inputs(entry, "terms").entries()) {
    const wanted = inputs(entry, "rpv01")[i]!;
    const curveAt = (rate: number) => {
      const curve = discountCurve({ kind: "zero", nodes: [...nodes, { years, rate }] });
      if (!curve.ok) throw new Error("a fitted curve is refused");
      return curve.value;
    };
    const rate = brentRoot((r) => dayCountAnnuity(years, curveAt(r), survival) - wanted, -0.2, 0.4);
    nodes.push({ years, rate });
  }
  const curve = discountCurve({ kind: "zero", nodes });
  if (!curve.ok) throw new Error("the fitted curve is refused");
  return curve.value;
}

/** The source accrues on actual days over 360. */
export const YEAR_ON_360 = 365 / 360;

function dayCountAnnuity(years: number, discount: DiscountCurve, survival: SurvivalCurve): number {
  return YEAR_ON_360 * swapLegs(evenSchedule(years * 4, 4), discount, survival).annuity;
}

/**
 * Protection legs, in percent of notional, on the printed hazards. The source goes on where a hazard is negative, which
 * the core refuses: that stretch, whose mass the core leaves out, is added by the middle of its years.
 */
function printedProtection(entry: Published): number[] {
  const survival = printedCurve(entry);
  const discount = fittedDiscount(entry, survival);
  const tenors = printedTenors(entry);
  let negative = 0;
  return tenors.map(({ years, hazard }, i) => {
    const from = tenors[i - 1]?.years ?? 0;
    const middle = (from + years) / 2;
    if (hazard < 0)
      negative +=
        hazard * (years - from) * discountFactor(discount, middle) * survivalProbability(survival, middle);
    return 60 * (swapLegs(evenSchedule(years * 4, 4), discount, survival).protection + negative);
  });
}

/** What accrued premium takes off the break-even spread, in basis points, at a hazard of S/(1 − R). */
function accruedEffect(entry: Published): number {
  const [spread, recovery, perYear] = [input(entry, "S"), input(entry, "R"), input(entry, "f")];
  const survival = flatHazard(spread / (1 - recovery));
  const schedule = evenSchedule(5 * perYear, perYear);
  const { protection, annuity } = swapLegs(schedule, flatCurve(0), survival);
  const without = schedule.periods.reduce(
    (sum, { accrual, end }) => sum + accrual * survivalProbability(survival, end),
    0,
  );
  return 1e4 * (1 - recovery) * protection * (1 / without - 1 / annuity);
}

/** By how much, in percent, discounting at the ends of periods understates the continuous protection leg. */
function discretisationEffect(entry: Published): number {
  const [rate, perYear] = [input(entry, "r"), input(entry, "M")];
  const survival = flatHazard(0.02);
  const discount = flatCurve(rate);
  const schedule = evenSchedule(5 * perYear, perYear);
  const ends = schedule.periods.reduce(
    (sum, { start, end }) =>
      sum +
      discountFactor(discount, end) *
        (survivalProbability(survival, start) - survivalProbability(survival, end)),
    0,
  );
  return 100 * (1 - ends / swapLegs(schedule, discount, survival).protection);
}

/** Risky annuity with accrued premium behind the source's fig. 12. */
const PRINTED_ANNUITY = 3.9104;

/** Single-name default swaps. */
export const defaultSwapChecks: readonly Check[] = [
  {
    of: /^HULL-CDS$/,
    compute: () => {
      const legs = textbookSwap(hullSwap);
      return [legs.payments, legs.accrual, legs.payoff, breakEven(legs)];
    },
  },
  {
    of: /^HULL-CDSbin$/,
    compute: () => {
      const legs = textbookSwap({ ...hullSwap, recovery: 0 });
      return [legs.payoff, breakEven(legs)];
    },
  },
  {
    of: /^HULL-CDSmtm$/,
    compute: (entry) => {
      const { payments, accrual, payoff } = textbookSwap(hullSwap);
      return [input(entry, "contract") * (payments + accrual) - payoff];
    },
  },
  {
    of: /^HULL-haz100$/,
    compute: (entry) => [textbookHazard(input(entry, "spread"), { recovery: 0.4, rate: 0.05, perYear: 1 })],
  },
  {
    of: /^HULL-haz50$/,
    compute: (entry) => [textbookHazard(input(entry, "spread"), { recovery: 0.4, rate: 0.035, perYear: 4 })],
  },
  {
    of: /^HULL-IC-haz07$/,
    compute: (entry) => [
      100 * textbookHazard(input(entry, "index"), { recovery: 0.4, rate: 0.03, perYear: 4 }),
    ],
  },
  {
    of: /^HULL-surv$/,
    compute: (entry) =>
      [1, 2, 3, 4, 5].map((t) => survivalProbability(flatHazard(input(entry, "hazard")), t)),
  },
  {
    of: /^HULL-avgh$/,
    compute: (entry) => {
      const spreads = inputs(entry, "s");
      const average = spreads.map((spread) => spread / (1 - input(entry, "R")));
      const nodes = inputs(entry, "T").map((years, i) => ({
        years,
        probability: defaultProbability(flatHazard(average[i]!), years),
      }));
      const curve = cumulativeDefault(nodes);
      const between = (from: number, to: number) =>
        (cumulativeHazard(curve, to) - cumulativeHazard(curve, from)) / (to - from);
      return [between(0, 3), between(0, 5), between(0, 10), between(3, 5), between(5, 10)];
    },
  },
  // No curve is printed: what can be checked is that leg, break-even and risky annuity with accrued fit one another.
  {
    of: /^OT-prot$/,
    compute: () => [1e7 * upfrontAt({ protection: 0, annuity: PRINTED_ANNUITY }, -142.7e-4)],
    agreement: 5e-4,
    approximation: { tolerance: 200, because: "the break-even is printed to 0.1 basis points" },
  },
  {
    of: /^OT-be$/,
    compute: () => [1e4 * parSpread({ protection: 557_872 / 1e7, annuity: PRINTED_ANNUITY })!],
    agreement: 1e-4,
  },
  {
    of: /^OT-accr$/,
    compute: (entry) => [accruedEffect(entry)],
    agreement: 0.01,
    approximation: { tolerance: 0.0083, because: "the source's formula is first order in the hazard: 1 %" },
  },
  {
    of: /^OT-disc$/,
    compute: (entry) => [discretisationEffect(entry)],
    agreement: 1e-3,
    approximation: { tolerance: 1e-4, because: "the source's formula is first order in the rate" },
  },
  {
    of: /^OT-Fig1[01]$/,
    compute: printedProtection,
    agreement: 0.02,
    approximation: { tolerance: 0.1, because: "the source prints neither its curve nor its dates" },
  },
];
