import { type TaskAnswer, type TaskMessage, tasks } from "./tasks";

/** The engine in the browser: answers one task after the other, away from the page's own thread. */
self.onmessage = ({ data: { id, kind, input } }: MessageEvent<TaskMessage>) => {
  self.postMessage(answered(id, () => tasks[kind](input as never)));
};

function answered(id: number, work: () => unknown): TaskAnswer {
  try {
    return { id, ok: true, output: work() };
  } catch (error) {
    return { id, ok: false, message: error instanceof Error ? error.message : String(error) };
  }
}
