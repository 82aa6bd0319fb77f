import { z } from "zod";
import { discountSchema, quoteSchema } from "../pricing/request";
import { inWorkspace } from "../workspaces/schema";

const name = z
  .string()
  .trim()
  .min(1, "Give the market a name.")
  .max(120, "A name has at most 120 characters.");
const isoDate = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, "A date is written YYYY-MM-DD.");

const solvedNode = z.strictObject({ strike: z.number(), rho: z.number() });

/** Tranche quotes of a pool at one maturity (a date, or years on an even schedule), and the base curve solved from them. */
const quotedMaturity = z.strictObject({
  maturity: isoDate.nullable(),
  years: z.number().nullable(),
  quotes: z
    .array(quoteSchema)
    .min(1, "Give at least one quote.")
    .max(50, "A maturity has at most 50 quotes."),
  /** Solved by the server when the market is saved, with the pool as it was then. */
  solved: z.array(solvedNode).max(50).optional(),
});
export type QuotedMaturity = z.infer<typeof quotedMaturity>;

/** A pool whose tranches are quoted. */
export const quotedPool = z.strictObject({
  key: z.string().min(1).max(60),
  name,
  poolId: z.string().min(1, "Choose a pool.").max(100),
  maturities: z.array(quotedMaturity).min(1, "Give at least one quote.").max(12, "At most 12 maturities."),
});
export type QuotedPool = z.infer<typeof quotedPool>;

/** What a market holds: the discount curve, the schedule rule and the holidays, and pools whose tranches are quoted. */
export const marketContent = z.strictObject({
  discount: discountSchema,
  schedule: z.discriminatedUnion("kind", [
    z.strictObject({
      kind: z.literal("even"),
      perYear: z.number().int().min(1, "At least one payment a year.").max(12, "At most 12 payments a year."),
    }),
    z.strictObject({ kind: z.literal("standard"), holidays: z.array(isoDate).max(5_000) }),
  ]),
  quotedPools: z.array(quotedPool).max(10, "A market has at most 10 quoted pools.").optional(),
});
export type MarketContent = z.infer<typeof marketContent>;

export const createInput = inWorkspace.extend({ name, pricingDate: isoDate, content: marketContent });
export const marketInput = inWorkspace.extend({ marketId: z.string().min(1).max(100) });
export const saveInput = marketInput.extend({
  version: z.number().int(),
  name,
  pricingDate: isoDate,
  content: marketContent,
});
export const archiveInput = marketInput.extend({ archived: z.boolean() });
export const copyInput = marketInput.extend({ name, pricingDate: isoDate });
