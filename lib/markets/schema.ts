import { z } from "zod";
import { discountSchema } from "../pricing/request";
import { inWorkspace } from "../workspaces/schema";

const name = z
  .string()
  .trim()
  .min(1, "Give the market a name.")
  .max(120, "A name has at most 120 characters.");
const isoDate = z.string().regex(/^\d{4}-\d{2}-\d{2}$/, "A date is written YYYY-MM-DD.");

/** What a market holds: the discount curve, the schedule rule and the holidays. */
export const marketContent = z.strictObject({
  discount: discountSchema,
  schedule: z.discriminatedUnion("kind", [
    z.strictObject({
      kind: z.literal("even"),
      perYear: z.number().int().min(1, "At least one payment a year.").max(12, "At most 12 payments a year."),
    }),
    z.strictObject({ kind: z.literal("standard"), holidays: z.array(isoDate).max(5_000) }),
  ]),
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
