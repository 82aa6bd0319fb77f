import { dealIn } from "../deals/find";
import { dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery } from "../platform/operation";
import type { StressCell } from "../pricing/stressGrid";
import { jobIn } from "./commands";
import { mayCancel, mayStart } from "./policy";
import { jobInput } from "./schema";
import { isUnfinished, type JobState } from "./states";
import type { GridInput } from "./stressGrid";

/** A deal's background work, newest first, without its results. */
const list = defineQuery({
  name: "jobs.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const self = await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const jobs = await context.tx.job.findMany({
      where: { dealId },
      orderBy: { createdAt: "desc" },
      omit: { input: true, result: true },
    });
    const nameOf = await peopleNames(
      context.tx,
      jobs.map((job) => job.createdById),
    );
    return {
      mayStart: mayStart(self),
      jobs: jobs.map((job) => ({
        id: job.id,
        state: job.state as JobState,
        done: job.done,
        total: job.total,
        by: nameOf(job.createdById),
        at: job.createdAt.toISOString(),
        mayCancel: isUnfinished(job.state) && mayCancel(self, job),
      })),
    };
  },
});

/** One piece of work with what it was asked and what is there so far. */
const open = defineQuery({
  name: "jobs.open",
  input: jobInput,
  async run(context, { workspaceId, jobId }) {
    const self = await context.member(workspaceId);
    const job = await jobIn(context, workspaceId, jobId);
    const { request, grid } = job.input as unknown as GridInput;
    const nameOf = await peopleNames(context.tx, [job.createdById]);
    return {
      id: job.id,
      dealId: job.dealId,
      state: job.state as JobState,
      done: job.done,
      total: job.total,
      problem: job.problem,
      by: nameOf(job.createdById),
      at: job.createdAt.toISOString(),
      mayCancel: isUnfinished(job.state) && mayCancel(self, job),
      grid,
      tranches: request.tranches,
      currency: request.currency ?? "EUR",
      cells: ((job.result as { cells?: StressCell[] } | null)?.cells ?? []) as StressCell[],
    };
  },
});

export const queries = { list, open };
