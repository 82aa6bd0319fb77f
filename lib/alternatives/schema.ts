import { z } from "zod";
import { dealClass, dealInput } from "../deals/schema";

/** What is kept of a structure beside the deal's own: its classes, and what they were sized to, in words. */
export const alternativeContent = z.strictObject({
  classes: z.array(dealClass).min(1, "An alternative has at least one class.").max(50),
  note: z.string().trim().max(1_000, "A note has at most 1,000 characters.").default(""),
});
export type AlternativeContent = z.infer<typeof alternativeContent>;

const alternativeName = z
  .string()
  .trim()
  .min(1, "Give the alternative a name.")
  .max(120, "A name has at most 120 characters.");

export const keepInput = dealInput.extend({ name: alternativeName, content: alternativeContent });
export const alternativeInput = dealInput.extend({ alternativeId: z.string().min(1).max(100) });
