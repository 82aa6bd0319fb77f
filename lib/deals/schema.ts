import { z } from "zod";
import { correlationSchema, trancheSchema } from "../pricing/request";
import { inWorkspace } from "../workspaces/schema";

export const dealName = z
  .string()
  .trim()
  .min(1, "Give the deal a name.")
  .max(120, "A name has at most 120 characters.");

/** A class of the capital structure: a tranche with a name. */
export const dealClass = trancheSchema.extend({
  name: z.string().trim().min(1, "Give the class a name.").max(60, "A class name has at most 60 characters."),
});
export type DealClass = z.infer<typeof dealClass>;

/** The base curve of a pool quoted in the deal's market, carried over to the deal's pool. */
const marketCorrelation = z.strictObject({
  kind: z.literal("market"),
  quotedPool: z.string().min(1, "Choose a quoted pool of the market.").max(60),
  interpolation: z.enum(["linear", "monotone"]),
  beyond: z.enum(["flat", "linear"]),
  mapping: z.enum(["none", "moneyness", "lossShare", "probability"]),
});

/** How the names of a deal default together: the request's own kinds, or a curve of the market. */
export const dealCorrelation = z.union([marketCorrelation, correlationSchema]);
export type DealCorrelation = z.infer<typeof dealCorrelation>;

/** What a deal holds beside its links to a pool and a market. Maturity for a standard schedule, years for an even one. */
export const dealContent = z.strictObject({
  maturity: z
    .string()
    .regex(/^\d{4}-\d{2}-\d{2}$/, "A maturity is written YYYY-MM-DD.")
    .nullable(),
  years: z.number().nullable(),
  law: z.enum(["finite", "largePool"]),
  correlation: dealCorrelation,
  classes: z.array(dealClass).max(50, "A deal has at most 50 classes."),
  nthToDefault: z.array(z.number()).max(200, "A deal has at most 200 n-th-to-default contracts."),
  notes: z.string().max(5_000, "Notes have at most 5,000 characters."),
});
export type DealContent = z.infer<typeof dealContent>;

const links = {
  poolId: z.string().min(1, "Choose a pool.").max(100),
  marketId: z.string().min(1, "Choose a market.").max(100),
};

export const partsInput = inWorkspace.extend(links);
export const createInput = inWorkspace.extend({ name: dealName, ...links, content: dealContent });
export const dealInput = inWorkspace.extend({ dealId: z.string().min(1).max(100) });
export const saveInput = dealInput.extend({
  version: z.number().int(),
  name: dealName,
  ...links,
  content: dealContent,
});
export const archiveInput = dealInput.extend({ archived: z.boolean() });
export const copyInput = dealInput.extend({ name: dealName });
export const versionInput = dealInput.extend({ version: z.number().int().min(1) });
