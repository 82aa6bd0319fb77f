import type { Prisma } from "@/lib/generated/prisma/client";
import type { Database } from "../platform/db/client";
import { Refusal } from "../platform/errors";
import { emitEvent } from "../platform/events/emit";
import { logError } from "../platform/log";
import type { StressCell } from "../pricing/stressGrid";
import { unfinished } from "./states";
import { type GridInput, workedCell } from "./stressGrid";

const LONGEST_TURN = 20_000;
const TELL_EVERY = 700;
const AT_ONCE = 2;
const PATIENCE = 1_000;

type Kept = { readonly cells: readonly StressCell[] };

/**
 * One turn at a job: takes up where it stands, works cells out and keeps them as they come, until the job is over, the turn
 * is, or `isStopping`. Cells are the same bits whoever works them out, so that a turn done twice by two processes does no
 * harm. Says whether more is left.
 */
export async function takeTurn(
  database: Database,
  jobId: string,
  isStopping: () => boolean,
): Promise<"over" | "more"> {
  const job = await database.job.findUnique({ where: { id: jobId } });
  if (!job || !(await isStill(database, jobId, { state: "running" }))) return "over";
  const input = job.input as unknown as GridInput;
  const cells: StressCell[] = [...((job.result as Kept | null)?.cells ?? [])];
  const tell = async (state: "running" | "done") => {
    const part = { state, done: cells.length, result: { cells } as unknown as Prisma.InputJsonValue };
    return database.$transaction(async (tx) => {
      if (!(await isStill(tx, jobId, part))) return false;
      const { workspaceId, dealId } = job;
      const kind = state === "done" ? "job.done" : "job.progress";
      await emitEvent(tx, { workspaceId, dealId, kind, payload: { jobId, done: cells.length } }, new Date());
      return true;
    });
  };
  const start = Date.now();
  let told = start;
  try {
    while (cells.length < job.total) {
      const next = Array.from({ length: Math.min(AT_ONCE, job.total - cells.length) }, (_, k) =>
        patiently(() => workedCell(input, cells.length + k, job.createdById)),
      );
      cells.push(...(await Promise.all(next)));
      if (cells.length === job.total) break;
      const isOver = Date.now() - start > LONGEST_TURN || isStopping();
      if (isOver || Date.now() - told > TELL_EVERY) {
        told = Date.now();
        if (!(await tell("running"))) return "over";
      }
      if (isOver) return "more";
    }
    await tell("done");
  } catch (error) {
    await fail(database, job, error);
  }
  return "over";
}

/** Changes a job that is still to be done; false when it was called off or is over. */
async function isStill(
  tx: Pick<Database, "job">,
  id: string,
  data: Prisma.JobUpdateManyMutationInput,
): Promise<boolean> {
  const { count } = await tx.job.updateMany({ where: { id, state: { in: [...unfinished] } }, data });
  return count > 0;
}

/** Tries again while the pricing threads are crowded. */
async function patiently<Result>(work: () => Promise<Result>): Promise<Result> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await work();
    } catch (error) {
      const isCrowded =
        error instanceof Refusal && ["queueFull", "tooManyRuns"].includes(error.problems[0]!.code);
      if (!isCrowded || attempt > 60) throw error;
      await new Promise((resolve) => setTimeout(resolve, PATIENCE));
    }
  }
}

async function fail(
  database: Database,
  { id, workspaceId, dealId }: { id: string; workspaceId: string; dealId: string },
  error: unknown,
): Promise<void> {
  const isTold = error instanceof Refusal;
  if (!isTold) logError(`job ${id}`, error);
  const problem = isTold ? error.message : "Something went wrong on our side. Start the grid again.";
  await database.$transaction(async (tx) => {
    if (!(await isStill(tx, id, { state: "failed", problem }))) return;
    await emitEvent(tx, { workspaceId, dealId, kind: "job.failed", payload: { jobId: id } }, new Date());
  });
}
