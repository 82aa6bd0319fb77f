import type { QuickCache } from "../pricing/quickCache";
import { type TaskAnswer, type TaskMessage, tasks } from "./tasks";

/** The engine in the browser: answers one task after the other, away from the page's own thread. */
self.onmessage = ({ data: { id, kind, input } }: MessageEvent<TaskMessage>) => {
  const answer = answered(id, () => tasks[kind](input as never));
  self.postMessage(answer, {
    transfer: kind === "quickCache" && answer.ok ? cacheBuffers(answer.output) : [],
  });
};

/** A cache is handed over, not copied: copying megabytes would hold the page up. */
function cacheBuffers(output: unknown): ArrayBuffer[] {
  const cache = output as QuickCache | null;
  return cache
    ? [cache.losses.minima.buffer, cache.losses.tails.buffer].map((buffer) => buffer as ArrayBuffer)
    : [];
}

function answered(id: number, work: () => unknown): TaskAnswer {
  try {
    return { id, ok: true, output: work() };
  } catch (error) {
    return { id, ok: false, message: error instanceof Error ? error.message : String(error) };
  }
}
