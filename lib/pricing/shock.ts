import { z } from "zod";

const scale = z
  .number()
  .refine((value) => value >= 0 && value <= 100, { message: "must be a factor between 0 and 100" });
const shift = z
  .number()
  .refine((value) => value >= -1 && value <= 1, { message: "must be a shift between -1 and 1 (decimal)" });
const identifier = z.string().min(1, "must not be empty").max(200, "must have at most 200 characters");

/**
 * A definite move of a request's inputs. Spreads go to `scale · s + shift` at every node, those of a sector times the
 * sector's own scale besides; recoveries move with the spreads kept; correlations move by a shift; names default today at
 * their moved recovery. All decimals.
 */
export const shockSchema = z.strictObject({
  scale: scale.default(1),
  shift: shift.default(0),
  correlation: shift.default(0),
  recovery: shift.default(0),
  sectors: z
    .array(
      z.strictObject({
        sector: z.string().max(500, "must have at most 500 characters"),
        scale: scale.default(1),
        recovery: shift.default(0),
      }),
    )
    .max(100, "may hold at most 100 sectors")
    .default([]),
  defaults: z
    .discriminatedUnion("kind", [
      z.strictObject({
        kind: z.literal("names"),
        ids: z.array(identifier).max(500, "may hold at most 500 names"),
      }),
      z.strictObject({
        kind: z.literal("widest"),
        count: z
          .number()
          .int("must be a whole number")
          .min(0, "must not be below 0")
          .max(500, "must be at most 500"),
      }),
    ])
    .default({ kind: "names", ids: [] }),
});

export type Shock = z.infer<typeof shockSchema>;

/** The shock that moves nothing. */
export const noShock: Shock = {
  scale: 1,
  shift: 0,
  correlation: 0,
  recovery: 0,
  sectors: [],
  defaults: { kind: "names", ids: [] },
};
