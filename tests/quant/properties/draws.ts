import fc from "fast-check";
import { price } from "@/lib/pricing/price";
import type { PricingReport } from "@/lib/pricing/report";
import type { CorrelationInput, CreditInput, NameInput, PricingRequest } from "@/lib/pricing/request";

/** The same draws every time, so that a landing does not depend on luck; PROPERTY_SEED asks for others. */
fc.configureGlobal({ seed: Number(process.env.PROPERTY_SEED ?? 20_260_320) });

/** A whole number of hundred random pools is what each property sees; PROPERTY_RUNS multiplies it. */
export function runs(count: number): { numRuns: number } {
  return { numRuns: Math.round(count * Number(process.env.PROPERTY_RUNS ?? 1)) };
}

function real(min: number, max: number) {
  return fc.double({ min, max, noNaN: true });
}

const credit: fc.Arbitrary<CreditInput> = fc.oneof(
  {
    weight: 5,
    arbitrary: fc
      .constantFrom(0, 1e-6, 0.001, 0.005, 0.02, 0.08, 0.4, 2.3)
      .map((rate): CreditInput => ({ kind: "hazard", rate })),
  },
  { weight: 2, arbitrary: real(0, 0.9).map((probability): CreditInput => ({ kind: "yearly", probability })) },
  {
    weight: 2,
    arbitrary: fc.tuple(real(0, 0.3), real(0, 0.6)).map(
      ([first, more]): CreditInput => ({
        kind: "cumulative",
        nodes: [
          { years: 0.7, probability: first },
          { years: 4, probability: first + (1 - first) * more },
        ],
      }),
    ),
  },
  {
    weight: 3,
    arbitrary: fc.tuple(real(0.0005, 0.05), real(0.8, 1.6)).map(
      ([spread, slope]): CreditInput => ({
        kind: "spread",
        nodes: [
          { years: 1, spread },
          { years: 3, spread: spread * slope },
        ],
      }),
    ),
  },
  { weight: 1, arbitrary: fc.constant<CreditInput>({ kind: "defaulted" }) },
);

const recovery = fc.oneof(fc.constantFrom(0, 0.25, 0.4, 0.4, 0.9), real(0, 0.95));

/** A pool as drawn: whole or odd notionals, one dominating name now and then, some names in default. */
export function pools(most: number, amounts: "lattice" | "any" = "any"): fc.Arbitrary<NameInput[]> {
  const whole = fc.integer({ min: 1, max: 10 });
  const isLattice = amounts === "lattice";
  const row = fc.record({
    notional: isLattice
      ? whole
      : fc.oneof({ weight: 4, arbitrary: whole }, { weight: 1, arbitrary: real(0.5, 20) }),
    recovery: isLattice ? fc.constantFrom(0, 0.4, 0.4, 0.9) : recovery,
    loading: real(-0.95, 0.95),
    sector: fc.constantFrom("A", "B", "C"),
    credit,
  });
  return fc
    .tuple(fc.array(row, { minLength: 1, maxLength: most }), fc.constantFrom(1, 1, 1, 12))
    .map(([rows, weight]) =>
      rows.map((drawn, i) => ({
        id: `N${i}`,
        ...drawn,
        notional: i === 0 ? drawn.notional * weight : drawn.notional,
      })),
    );
}

/** Flat correlations with both ends. */
export const rhos = fc.constantFrom(0, 0.05, 0.3, 0.7, 0.95, 0.999, 1);

export const flat: fc.Arbitrary<CorrelationInput> = rhos.map((rho) => ({ kind: "flat", rho }));

/** Flat correlations and loadings of both signs. */
export const oneFactor: fc.Arbitrary<CorrelationInput> = fc.oneof(
  { weight: 3, arbitrary: flat },
  { weight: 1, arbitrary: fc.constant<CorrelationInput>({ kind: "loadings" }) },
);

/** Pools with a dependence of one factor. */
export function poolsWithDependence(most: number): fc.Arbitrary<[NameInput[], CorrelationInput]> {
  return fc.tuple(pools(most), oneFactor);
}

/** Few whole amounts in sectors, which cost far more than one factor. */
export const poolsInSectors: fc.Arbitrary<[NameInput[], CorrelationInput]> = fc.tuple(
  pools(8).map((names) =>
    names.map((name) => ({ ...name, notional: Math.ceil(Math.min(name.notional, 10)), recovery: 0.4 })),
  ),
  fc
    .tuple(fc.constantFrom(0.1, 0.4), fc.constantFrom(0, 0.5, 1))
    .map(([within, share]): CorrelationInput => ({ kind: "sector", within, between: within * share })),
);

type Market = Pick<PricingRequest, "schedule" | "discount" | "pricingDate">;

const discount = fc.oneof(
  fc.constantFrom(-0.015, 0, 0.03).map((rate) => ({ kind: "flat" as const, rate })),
  fc.tuple(real(-0.02, 0.05), real(-0.02, 0.05)).map(([near, far]) => ({
    kind: "zero" as const,
    nodes: [
      { years: 1, rate: near },
      { years: 5, rate: far },
    ],
  })),
  fc.tuple(real(-0.01, 0.04), real(-0.01, 0.04)).map(([near, far]) => ({
    kind: "par" as const,
    nodes: [
      { years: 1, rate: near },
      { years: 4, rate: far },
    ],
  })),
);

/** Even and standard schedules, rates of both signs. */
export const markets: fc.Arbitrary<Market> = fc.oneof(
  fc
    .record({ years: fc.constantFrom(1, 2, 3), perYear: fc.constantFrom(1, 2, 4), discount })
    .map(({ years, perYear, discount: curve }) => ({
      schedule: { kind: "even" as const, years, perYear },
      discount: curve,
    })),
  fc
    .record({
      pricingDate: fc.constantFrom("2026-03-19", "2026-03-20", "2026-05-17", "2026-12-19"),
      maturity: fc.constantFrom("2027-06-20", "2028-12-20"),
      holidays: fc.constantFrom<string[]>([], ["2026-12-21", "2027-06-21"]),
      discount,
    })
    .map(({ pricingDate, maturity, holidays, discount: curve }) => ({
      pricingDate,
      schedule: { kind: "standard" as const, maturity, holidays },
      discount: curve,
    })),
);

/** One period only. */
export const onePeriod: Market = {
  schedule: { kind: "even", years: 1, perYear: 1 },
  discount: { kind: "flat", rate: -0.01 },
};

/** A short plain market, for properties that have nothing to do with schedules. */
export const plainMarket: Market = {
  schedule: { kind: "even", years: 3, perYear: 1 },
  discount: { kind: "flat", rate: 0.02 },
};

/** Adjacent classes between rising strikes, at one running coupon. */
export function classes(strikes: readonly number[], running = 0.01): PricingRequest["tranches"] {
  return strikes.slice(1).map((detachment, i) => ({
    id: `T${i}`,
    attachment: strikes[i]!,
    detachment,
    running,
    upfront: 0,
  }));
}

/** Strikes from 0 to 1 with some drawn in between. */
export const strikeLadders: fc.Arbitrary<number[]> = fc
  .array(
    fc.oneof(
      real(0.002, 0.998),
      fc.integer({ min: 1, max: 39 }).map((step) => step / 40),
    ),
    {
      minLength: 1,
      maxLength: 6,
    },
  )
  .map((inner) => [0, ...[...new Set(inner)].sort((a, b) => a - b), 1])
  .filter((strikes) => strikes.every((strike, i) => i === 0 || strike - strikes[i - 1]! > 1e-3));

/** Prices a request that should be sound; its problems as an error when it is not. */
export function reportOf(request: PricingRequest): PricingReport {
  const outcome = price(request);
  if (!outcome.ok)
    throw new Error(outcome.problems.map(({ path, message }) => `${path}: ${message}`).join(" "));
  return outcome.report;
}

/** A request for a pool and a dependence on a market. */
export function requestOf(
  market: Market,
  pool: NameInput[],
  correlation: CorrelationInput,
  more: Partial<PricingRequest> = {},
): PricingRequest {
  return { format: 1, ...market, pool, correlation, tranches: [], ...more };
}
