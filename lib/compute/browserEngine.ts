import type { TaskAnswer, TaskInput, TaskKind, TaskMessage, TaskOutput } from "./tasks";

/** A task still running after this long is given up, by ending its worker, when a newer one supersedes it. */
const PATIENCE = 600;

interface Asked {
  readonly message: TaskMessage;
  readonly resolve: (answer: TaskAnswer | null) => void;
}

/** How often a worker that failed before answering is opened again, and after how many milliseconds at first. */
const MOST_FAILURES = 4;
const RETRY = 400;

/**
 * One line to the engine in this browser, with a worker of its own. The latest task wins: one that waits is dropped for a
 * newer one, one that runs long is given up.
 */
export class EngineLine {
  private worker: Worker | null = null;
  private running: (Asked & { readonly since: number }) | null = null;
  private waiting: Asked | null = null;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private count = 0;
  private failures = 0;

  /**
   * Runs a task; null when a newer task superseded it.
   * @throws Error when the engine itself fails (refusals are outputs, not errors).
   */
  async run<Kind extends TaskKind>(kind: Kind, input: TaskInput<Kind>): Promise<TaskOutput<Kind> | null> {
    const answer = await new Promise<TaskAnswer | null>((resolve) => {
      this.waiting?.resolve(null);
      this.count += 1;
      this.waiting = { message: { id: this.count, kind, input }, resolve };
      this.advance();
    });
    if (answer === null) return null;
    if (!answer.ok) throw new Error(answer.message);
    return answer.output as TaskOutput<Kind>;
  }

  /** Ends the worker and drops what is under way. */
  close(): void {
    this.abandon();
    this.waiting?.resolve(null);
    this.waiting = null;
  }

  private advance(): void {
    if (!this.waiting) return;
    if (this.running) {
      const left = this.running.since + PATIENCE - performance.now();
      if (left > 0) {
        this.timer ??= setTimeout(() => {
          this.timer = null;
          this.advance();
        }, left);
        return;
      }
      this.abandon();
    }
    const next = this.waiting;
    this.waiting = null;
    this.running = { ...next, since: performance.now() };
    this.worker ??= this.open();
    this.worker.postMessage(next.message);
  }

  private open(): Worker {
    const worker = new Worker(new URL("./browserWorker.ts", import.meta.url), { type: "module" });
    worker.onmessage = ({ data }: MessageEvent<TaskAnswer>) => {
      this.failures = 0;
      if (data.id !== this.running?.message.id) return;
      this.finish(data);
    };
    worker.onerror = ({ message }) => {
      if (worker !== this.worker) return;
      worker.terminate();
      this.worker = null;
      this.failures += 1;
      const task = this.running?.message;
      if (this.failures <= MOST_FAILURES && task) {
        setTimeout(() => this.again(task), RETRY * this.failures);
        return;
      }
      const id = task?.id ?? 0;
      this.finish({ id, ok: false, message: message || "The engine in this browser could not be loaded." });
    };
    return worker;
  }

  /** A worker whose script did not come, over a lost connection say, is opened again for the task at hand. */
  private again(task: TaskMessage): void {
    if (this.running?.message !== task) return;
    this.worker ??= this.open();
    this.worker.postMessage(task);
  }

  private finish(answer: TaskAnswer): void {
    const { running } = this;
    this.running = null;
    running?.resolve(answer);
    this.advance();
  }

  private abandon(): void {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.running?.resolve(null);
    this.running = null;
    this.worker?.terminate();
    this.worker = null;
  }
}
