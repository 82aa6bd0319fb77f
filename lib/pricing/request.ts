import { z } from "zod";

/** Largest request that is priced; anything beyond is refused by name. */
export const LIMITS = {
  names: 20_000,
  nodes: 200,
  tranches: 200,
  contracts: 200,
  quotes: 50,
  holidays: 5_000,
  years: 100,
  payments: 1_200,
  /** Names × grid steps × dates × valuations: some tens of minutes of one core. */
  work: 5e10,
} as const;

function within(low: number, high: number, words: string) {
  return z.number().refine((value) => value >= low && value <= high, { message: words });
}

const probability = within(0, 1, "must be a probability between 0 and 1");
const fraction = within(0, 1, "must be a fraction between 0 and 1");
const correlationValue = within(0, 1, "must be a correlation between 0 and 1");
const positiveYears = z.number().refine((value) => value > 0 && value <= LIMITS.years, {
  message: `must be a number of years above 0 and at most ${LIMITS.years}`,
});
const rate = within(-1, 10, "must be a rate between -1 and 10 (decimal, 0.01 is 1 %)");
const isoDate = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, "must be a date YYYY-MM-DD");
const identifier = z.string().min(1, "must not be empty").max(200, "must have at most 200 characters");
const text = z.string().max(500, "must have at most 500 characters");

function listOf<Item extends z.ZodType>(item: Item, most: number, what: string) {
  return z.array(item).max(most, `may hold at most ${most} ${what}`);
}

const evenSchedule = z.strictObject({
  kind: z.literal("even"),
  years: positiveYears,
  perYear: z.number().refine((value) => value > 0 && value <= 12, {
    message: "must be above 0 and at most 12 payments a year",
  }),
});
const standardSchedule = z.strictObject({
  kind: z.literal("standard"),
  maturity: isoDate,
  holidays: listOf(isoDate, LIMITS.holidays, "holidays"),
});
export const scheduleSchema = z.discriminatedUnion("kind", [evenSchedule, standardSchedule]);

const rateNodes = listOf(z.strictObject({ years: positiveYears, rate }), LIMITS.nodes, "nodes").min(
  1,
  "must have at least one node",
);
export const discountSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("flat"), rate }),
  z.strictObject({ kind: z.literal("zero"), nodes: rateNodes }),
  z.strictObject({ kind: z.literal("par"), nodes: rateNodes }),
]);

const spread = within(0, 1_000, "must be a spread of zero or more (decimal, 0.01 is 100 bp)");
export const creditSchema = z.discriminatedUnion("kind", [
  z.strictObject({
    kind: z.literal("hazard"),
    rate: within(0, 1_000, "must be a hazard rate of zero or more"),
  }),
  z.strictObject({ kind: z.literal("yearly"), probability }),
  z.strictObject({
    kind: z.literal("cumulative"),
    nodes: listOf(z.strictObject({ years: positiveYears, probability }), LIMITS.nodes, "nodes").min(
      1,
      "must have at least one node",
    ),
  }),
  z.strictObject({
    kind: z.literal("spread"),
    nodes: listOf(z.strictObject({ years: positiveYears, spread }), LIMITS.nodes, "nodes").min(
      1,
      "must have at least one node",
    ),
  }),
  z.strictObject({
    kind: z.literal("upfront"),
    years: positiveYears,
    upfront: within(-10, 1, "must be an upfront of at most 1 (decimal, 0.01 is 1 %)"),
    coupon: spread,
  }),
  z.strictObject({ kind: z.literal("defaulted") }),
]);

export const nameSchema = z.strictObject({
  id: identifier,
  name: text.optional(),
  sector: text.optional(),
  notional: z.number().refine((value) => value > 0 && value <= 1e15, { message: "must be above 0" }),
  recovery: z
    .number()
    .refine((value) => value >= 0 && value < 1, { message: "must be at least 0 and below 1" }),
  loading: z
    .number()
    .refine((value) => value > -1 && value < 1, { message: "must be a loading above -1 and below 1" })
    .optional(),
  credit: creditSchema,
});

const poolSchema = listOf(nameSchema, LIMITS.names, "names").min(1, "must have at least one name");

export const quoteSchema = z.strictObject({
  attachment: fraction,
  detachment: fraction,
  running: within(-10, 10, "must be a running coupon (decimal, 0.01 is 100 bp)"),
  upfront: within(-10, 10, "must be an upfront (decimal, 0.01 is 1 %)"),
});

const baseCommon = {
  kind: z.literal("base"),
  interpolation: z.enum(["linear", "monotone"]),
  beyond: z.enum(["flat", "linear"]),
  mapping: z.enum(["none", "moneyness", "lossShare", "probability"]),
  index: z.strictObject({ pool: poolSchema }).optional(),
};

export const correlationSchema = z.union([
  z.strictObject({ kind: z.literal("flat"), rho: correlationValue }),
  z.strictObject({ kind: z.literal("loadings") }),
  z.strictObject({ kind: z.literal("sector"), within: correlationValue, between: correlationValue }),
  z.strictObject({
    ...baseCommon,
    nodes: listOf(z.strictObject({ strike: fraction, rho: correlationValue }), LIMITS.quotes, "nodes").min(
      1,
      "must have at least one node",
    ),
  }),
  z.strictObject({
    ...baseCommon,
    quotes: listOf(quoteSchema, LIMITS.quotes, "quotes").min(1, "must have at least one quote"),
  }),
]);

export const trancheSchema = z.strictObject({
  id: identifier,
  attachment: fraction,
  detachment: fraction,
  running: within(-10, 10, "must be a running coupon (decimal, 0.01 is 100 bp)").optional(),
  upfront: within(-10, 10, "must be an upfront (decimal, 0.01 is 1 %)").optional(),
  recoveryPaydown: z.boolean().optional(),
});

export const extras = [
  "lossLaw",
  "timeline",
  "impliedCorrelation",
  "sensitivities",
  "pairs",
  "audit",
] as const;

/** The pricing request: the one source of its types. Units are decimals and years. Unknown fields are refused. */
export const requestSchema = z.strictObject({
  format: z.literal(1),
  currency: z
    .string()
    .regex(/^[A-Z]{3}$/, "must be a currency code of three capital letters")
    .optional(),
  pricingDate: isoDate.optional(),
  schedule: scheduleSchema,
  discount: discountSchema,
  pool: poolSchema,
  correlation: correlationSchema,
  law: z
    .discriminatedUnion("kind", [
      z.strictObject({
        kind: z.literal("finite"),
        unit: within(1e-5, 1, "must be a unit between 0.00001 and 1").optional(),
      }),
      z.strictObject({ kind: z.literal("largePool") }),
    ])
    .optional(),
  tranches: listOf(trancheSchema, LIMITS.tranches, "tranches"),
  nthToDefault: listOf(z.number(), LIMITS.contracts, "contracts").optional(),
  include: z.array(z.enum(extras)).max(extras.length).optional(),
});

export type PricingRequest = z.infer<typeof requestSchema>;
export type NameInput = z.infer<typeof nameSchema>;
export type CreditInput = z.infer<typeof creditSchema>;
export type ScheduleInput = z.infer<typeof scheduleSchema>;
export type DiscountInput = z.infer<typeof discountSchema>;
export type CorrelationInput = z.infer<typeof correlationSchema>;
export type BaseCorrelationInput = Extract<CorrelationInput, { kind: "base" }>;
export type TrancheInput = z.infer<typeof trancheSchema>;
export type Extra = (typeof extras)[number];
