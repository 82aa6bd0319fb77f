import { z } from "zod";
import { inWorkspace } from "../workspaces/schema";

const id = z.string().min(1).max(100);

export const askInput = inWorkspace.extend({
  runId: id,
  reviewers: z.array(id).min(1, "Name at least one reviewer.").max(20, "A review has at most 20 reviewers."),
  note: z.string().trim().max(2_000, "A note has at most 2,000 characters.").default(""),
});
export const reviewInput = inWorkspace.extend({ reviewId: id });
export const answerInput = reviewInput.extend({
  answer: z.enum(["signed", "sentBack"]),
  reason: z.string().trim().max(2_000, "A reason has at most 2,000 characters.").default(""),
  /** Which lines of the checklist were checked, in their order. */
  checks: z.array(z.boolean()).max(50),
});

/** What a workspace wants of every review. */
export const reviewSettings = z.strictObject({
  checklist: z
    .array(
      z
        .string()
        .trim()
        .min(1, "A line of the checklist is empty.")
        .max(300, "A line has at most 300 characters."),
    )
    .max(30, "A checklist has at most 30 lines."),
  needed: z.number().int().min(1, "At least one person must sign.").max(5, "At most five people must sign."),
});
export type ReviewSettings = z.infer<typeof reviewSettings>;
export const settingsInput = inWorkspace.extend({ settings: reviewSettings });

const usual: ReviewSettings = {
  checklist: [
    "Pool: names, notionals and recoveries are those of the term sheet",
    "Market: pricing date, curve and quotes are those agreed",
    "Figures: numerical error and warnings were looked at",
  ],
  needed: 1,
};

/** The settings of a workspace as stored, or the usual ones. */
export function settingsOf(stored: unknown): ReviewSettings {
  const parsed = reviewSettings.safeParse((stored as { review?: unknown } | null)?.review);
  return parsed.success ? parsed.data : usual;
}
