import type { PricingRequest } from "@/lib/pricing/request";

const names: PricingRequest["pool"] = [
  { id: "A", sector: "S1", loading: 0.5, notional: 3, recovery: 0.4, credit: { kind: "hazard", rate: 0.02 } },
  {
    id: "B",
    sector: "S1",
    loading: -0.3,
    notional: 2,
    recovery: 0,
    credit: { kind: "yearly", probability: 0.1 },
  },
  {
    id: "C",
    sector: "S2",
    loading: 0.9,
    notional: 1,
    recovery: 0.9,
    credit: {
      kind: "cumulative",
      nodes: [
        { years: 1, probability: 0.01 },
        { years: 3, probability: 0.05 },
      ],
    },
  },
  {
    id: "D",
    sector: "S2",
    loading: 0,
    notional: 4,
    recovery: 0.4,
    credit: {
      kind: "spread",
      nodes: [
        { years: 1, spread: 0.01 },
        { years: 2, spread: 0.012 },
      ],
    },
  },
  {
    id: "E",
    sector: "S1",
    loading: 0.2,
    notional: 1,
    recovery: 0.4,
    credit: { kind: "upfront", years: 1, upfront: 0.02, coupon: 0.01 },
  },
  { id: "F", sector: "S2", loading: 0.7, notional: 1, recovery: 0.3, credit: { kind: "defaulted" } },
];

const tranches: PricingRequest["tranches"] = [
  { id: "T1", attachment: 0, detachment: 0.2, running: 0.05, upfront: 0.1 },
  { id: "T2", attachment: 0.2, detachment: 0.5, running: 0.01, upfront: 0, recoveryPaydown: true },
  { id: "T3", attachment: 0.5, detachment: 1 },
];

const even: Pick<PricingRequest, "format" | "schedule" | "discount" | "pool" | "tranches"> = {
  format: 1,
  schedule: { kind: "even", years: 2, perYear: 1 },
  discount: { kind: "flat", rate: -0.01 },
  pool: names,
  tranches,
};

const alike: PricingRequest["pool"] = ["A", "B", "C", "D"].map((id) => ({
  id,
  notional: 1,
  recovery: 0.4,
  credit: { kind: "hazard", rate: 0.03 },
}));

/** A sound request of every kind: what the fuzz changes. */
export const seeds: readonly PricingRequest[] = [
  {
    ...even,
    correlation: { kind: "flat", rho: 0.3 },
    nthToDefault: [1, 2],
    include: ["lossLaw", "timeline", "pairs"],
  },
  { ...even, correlation: { kind: "loadings" }, currency: "USD", include: ["audit"] },
  {
    ...even,
    pricingDate: "2026-03-23",
    schedule: { kind: "standard", maturity: "2027-06-20", holidays: ["2026-06-22", "2026-12-21"] },
    discount: {
      kind: "par",
      nodes: [
        { years: 1, rate: 0.02 },
        { years: 3, rate: 0.03 },
      ],
    },
    correlation: { kind: "flat", rho: 0 },
    pool: alike,
  },
  {
    ...even,
    pool: alike,
    discount: {
      kind: "zero",
      nodes: [
        { years: 1, rate: 0.02 },
        { years: 3, rate: -0.01 },
      ],
    },
    correlation: {
      kind: "base",
      nodes: [
        { strike: 0.1, rho: 0.2 },
        { strike: 0.5, rho: 0.6 },
      ],
      interpolation: "monotone",
      beyond: "linear",
      mapping: "moneyness",
      index: { pool: alike.map((name) => ({ ...name, notional: 2 })) },
    },
  },
  {
    ...even,
    pool: alike,
    correlation: {
      kind: "base",
      quotes: [
        { attachment: 0, detachment: 0.15, running: 0.05, upfront: 0.15 },
        { attachment: 0.15, detachment: 0.45, running: 0.01, upfront: 0 },
      ],
      interpolation: "linear",
      beyond: "flat",
      mapping: "none",
    },
  },
  {
    ...even,
    pool: alike,
    law: { kind: "largePool" },
    correlation: { kind: "flat", rho: 0.2 },
    include: ["lossLaw"],
  },
  {
    ...even,
    pool: alike.slice(0, 2),
    law: { kind: "finite", unit: 0.01 },
    correlation: { kind: "flat", rho: 1 },
  },
  {
    ...even,
    schedule: { kind: "even", years: 1, perYear: 1 },
    pool: alike.slice(0, 2),
    tranches: tranches.slice(0, 1),
    correlation: { kind: "flat", rho: 0.4 },
    include: ["sensitivities"],
  },
];

/** Two names in two sectors. */
export const sectorSeed: PricingRequest = {
  ...even,
  schedule: { kind: "even", years: 1, perYear: 1 },
  tranches: tranches.slice(0, 1),
  pool: alike.slice(0, 2).map((name, i) => ({ ...name, sector: `S${i}` })),
  correlation: { kind: "sector", within: 0.3, between: 0.1 },
};
