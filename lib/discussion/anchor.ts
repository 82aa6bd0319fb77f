import { z } from "zod";
import type { PricingReport } from "../pricing/report";

const id = z.string().min(1).max(200);
const label = z.string().trim().min(1).max(200);

/** What a thread is pinned to. A figure keeps the value it had, so that it can be shown then and now. */
export const anchorSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("deal") }),
  z.strictObject({ kind: z.literal("class"), id, label }),
  z.strictObject({ kind: z.literal("name"), id, label }),
  z.strictObject({ kind: z.literal("quote"), id, label }),
  z.strictObject({
    kind: z.literal("figure"),
    runId: id,
    /** Where the figure stands in a report, by ids: `pool.parSpread`, `tranches/K/parSpread`, `nthToDefault/2/annuity`. */
    path: z.string().min(1).max(300),
    label,
  }),
]);
export type Anchor = z.infer<typeof anchorSchema>;

/** What marks are counted by: a figure's path whatever the run, else kind and id; the deal itself has no mark. */
export function markKey(anchor: Anchor): string | null {
  if (anchor.kind === "deal") return null;
  return `${anchor.kind} ${anchor.kind === "figure" ? anchor.path : anchor.id}`;
}

/** The figure at a path by ids; null where the report has no such class, contract or number. */
export function figureAt(report: PricingReport, path: string): number | null {
  const [room = "", key = "", field = ""] = path.split("/");
  if (path.startsWith("pool.")) return numberIn(report.pool, path.slice("pool.".length));
  if (room === "tranches")
    return numberIn(
      report.tranches.find((row) => row.id === key),
      field,
    );
  if (room === "nthToDefault")
    return numberIn(
      report.nthToDefault.find((row) => String(row.n) === key),
      field,
    );
  return null;
}

function numberIn(row: object | undefined, field: string): number | null {
  if (!row || !Object.hasOwn(row, field)) return null;
  const value = (row as Record<string, unknown>)[field];
  return typeof value === "number" ? value : null;
}
