import { availableParallelism } from "node:os";
import { Piscina } from "piscina";
import { refuse } from "../platform/errors";
import type { PricingAnswer } from "./protocol";
import type { TaskInput, TaskKind, TaskMessage, TaskOutput } from "./tasks";
import { workerFile } from "./workerFile";

const LONGEST_QUEUE = 64;
const MOST_PER_PERSON = 8;
const LONGEST_RUN = 5 * 60_000;

interface ComputePool {
  readonly threads: Promise<Piscina<Omit<TaskMessage, "id">, unknown>>;
  readonly waiting: Map<string, number>;
}

const shared = globalThis as typeof globalThis & { loadlineCompute?: ComputePool | undefined };

function pool(): ComputePool {
  shared.loadlineCompute ??= { threads: startThreads(), waiting: new Map() };
  return shared.loadlineCompute;
}

async function startThreads(): Promise<Piscina<Omit<TaskMessage, "id">, unknown>> {
  const filename = await workerFile();
  const threads = Math.max(1, availableParallelism() - 1);
  return new Piscina({
    filename,
    minThreads: 1,
    maxThreads: threads,
    maxQueue: LONGEST_QUEUE,
    idleTimeout: 60_000,
  });
}

/** Prices a request in a thread of its own. @throws Refusal as `computeOnServer` does. */
export function priceOnServer(request: unknown, person: string): Promise<PricingAnswer> {
  return computeOnServer("price", request, person);
}

/**
 * Runs a task in a thread of its own, never on the web thread. Each person may have a few tasks waiting, so that one
 * cannot crowd out the others.
 * @throws Refusal "unavailable" when the queue is full or the task took too long.
 */
export async function computeOnServer<Kind extends TaskKind>(
  kind: Kind,
  input: TaskInput<Kind>,
  person: string,
): Promise<TaskOutput<Kind>> {
  const { threads, waiting } = pool();
  const own = waiting.get(person) ?? 0;
  if (own >= MOST_PER_PERSON)
    throw refuse("limited", "tooManyRuns", `You have ${own} pricings under way: wait for one to end.`);
  waiting.set(person, own + 1);
  try {
    const piscina = await threads;
    if (piscina.queueSize >= LONGEST_QUEUE)
      throw refuse("unavailable", "queueFull", "Too many pricings are waiting: try again in a minute.");
    const signal = AbortSignal.timeout(LONGEST_RUN);
    return (await piscina.run({ kind, input }, { signal })) as TaskOutput<Kind>;
  } catch (error) {
    if (error instanceof Error && error.name === "AbortError") {
      throw refuse(
        "unavailable",
        "tooLong",
        "The pricing took more than five minutes and was stopped: ask for less at once.",
      );
    }
    throw error;
  } finally {
    const left = (waiting.get(person) ?? 1) - 1;
    if (left > 0) waiting.set(person, left);
    else waiting.delete(person);
  }
}

/** Ends the threads. */
export async function closeCompute(): Promise<void> {
  const open = shared.loadlineCompute;
  shared.loadlineCompute = undefined;
  if (open) await (await open.threads).destroy();
}
