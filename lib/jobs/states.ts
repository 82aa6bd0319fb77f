/** Where background work stands. */
export type JobState = "queued" | "running" | "done" | "failed" | "cancelled";

/** States of work that is still to be done. */
export const unfinished: readonly JobState[] = ["queued", "running"];

export function isUnfinished(state: string): boolean {
  return (unfinished as readonly string[]).includes(state);
}
