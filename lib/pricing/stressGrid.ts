import { z } from "zod";
import { type Shock, shockSchema } from "./shock";
import type { ShockedFigures } from "./shockedFigures";

const MOST_STEPS = 21;

function axis(least: number, most: number, what: string) {
  return z
    .array(
      z.number().refine((value) => value >= least && value <= most, {
        message: `${what} must be from ${least} to ${most}`,
      }),
    )
    .min(1, `Give at least one ${what}.`)
    .max(MOST_STEPS, `Give at most ${MOST_STEPS} of each shock.`)
    .refine((steps) => new Set(steps).size === steps.length, { message: `Each ${what} may come once.` });
}

/**
 * Spread shocks (down the rows) by correlation shifts (along the columns), on top of one common shock. `relative` spread
 * steps are fractions of every spread (0.5 is half as wide again), `absolute` ones are decimals added to it.
 */
export const gridSchema = z.strictObject({
  spreads: z.discriminatedUnion("kind", [
    z.strictObject({ kind: z.literal("relative"), steps: axis(-1, 10, "spread shock") }),
    z.strictObject({ kind: z.literal("absolute"), steps: axis(-1, 1, "spread shock") }),
  ]),
  correlations: axis(-1, 1, "correlation shift"),
  shock: shockSchema,
});
export type StressGrid = z.infer<typeof gridSchema>;

/** A cell of a grid as worked out. */
export type StressCell = ShockedFigures;

export function cellCount({ spreads, correlations }: StressGrid): number {
  return spreads.steps.length * correlations.length;
}

/** The shock of a cell; cells run along the rows. */
export function cellShock({ spreads, correlations, shock }: StressGrid, index: number): Shock {
  const step = spreads.steps[Math.floor(index / correlations.length)]!;
  const correlation = shock.correlation + correlations[index % correlations.length]!;
  const isRelative = spreads.kind === "relative";
  return {
    ...shock,
    scale: isRelative ? shock.scale * (1 + step) : shock.scale,
    shift: isRelative ? shock.shift : shock.shift + step,
    correlation,
  };
}
