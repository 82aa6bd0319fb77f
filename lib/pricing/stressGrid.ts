import { z } from "zod";
import { noShock, type Shock, shockSchema } from "./shock";
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

/** Cells to be worked out: the request unmoved, to measure from, then the grid's own along its rows. */
export function cellCount({ spreads, correlations }: StressGrid): number {
  return 1 + spreads.steps.length * correlations.length;
}

/** The shock of a cell: none in the first, then the common shock with the cell's own steps on top. */
export function cellShock({ spreads, correlations, shock }: StressGrid, index: number): Shock {
  if (index === 0) return noShock;
  const place = index - 1;
  const step = spreads.steps[Math.floor(place / correlations.length)]!;
  const correlation = shock.correlation + correlations[place % correlations.length]!;
  const isRelative = spreads.kind === "relative";
  return {
    ...shock,
    scale: isRelative ? shock.scale * (1 + step) : shock.scale,
    shift: isRelative ? shock.shift : shock.shift + step,
    correlation,
  };
}

/** Where a row and a column of the grid stand among its cells. */
export function cellAt({ correlations }: StressGrid, row: number, column: number): number {
  return 1 + row * correlations.length + column;
}
