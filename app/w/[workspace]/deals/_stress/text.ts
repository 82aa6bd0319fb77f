import type { Operations } from "@/lib/operations";
import type { GridForm, ShockForm } from "@/lib/scenarios/form";

export type Scenarios = Operations["scenarios.list"]["output"];
export type Work = Operations["jobs.list"]["output"];

/** What the stress room holds as typed, kept in this browser. */
export interface StressText {
  readonly shock: ShockForm;
  readonly grid: GridForm;
  /** The scenario that the shock was taken from, and its version then. */
  readonly of: { readonly id: string; readonly version: number } | null;
}
