import { randomUUID } from "node:crypto";
import { dealIn } from "../deals/find";
import { notFound, Refusal, refuse } from "../platform/errors";
import { defineCommand, type QueryContext } from "../platform/operation";
import { checkRequest } from "../pricing/refusals";
import { cellCount } from "../pricing/stressGrid";
import { need } from "../workspaces/policy";
import { JOBS_CHANNEL } from "./channel";
import { mayCancel, mayStart } from "./policy";
import { jobInput, startInput } from "./schema";
import { isUnfinished, unfinished } from "./states";

const MOST_PER_PERSON = 3;
const MOST_PER_WORKSPACE = 12;
const KEPT_PER_DEAL = 20;
const LONGEST_INPUT = 4_000_000;

/** Has a stress grid worked out in the background; it goes on when the page is closed or the server starts anew. */
const start = defineCommand({
  name: "jobs.start",
  input: startInput,
  async run(context, { workspaceId, dealId, request, grid }) {
    const { tx, actor, now, member, record, emit } = context;
    const self = await member(workspaceId);
    need(mayStart(self), self.role, "have a grid worked out on the server");
    await dealIn(context, workspaceId, dealId);
    const checked = checkRequest(request);
    if (!checked.ok) throw new Refusal("invalid", checked.problems);
    const input = { request: checked.request, grid };
    if (JSON.stringify(input).length > LONGEST_INPUT)
      throw refuse("invalid", "tooLarge", "This pool is too large for a grid in the background.");
    await refuseCrowding(context, workspaceId);
    const id = randomUUID();
    const total = cellCount(grid);
    await tx.job.create({
      data: {
        id,
        workspaceId,
        dealId,
        kind: "stressGrid",
        input: input as never,
        total,
        createdById: actor.userId,
        createdAt: now,
      },
    });
    await dropOld(context, dealId);
    await record({
      workspaceId,
      dealId,
      kind: "job.started",
      subjectKind: "job",
      subjectId: id,
      after: { kind: "stressGrid", cells: total },
    });
    await emit({ workspaceId, dealId, kind: "job.queued", payload: { jobId: id } });
    await tx.$executeRaw`SELECT pg_notify(${JOBS_CHANNEL}, ${id})`;
    return { jobId: id };
  },
});

/** Calls work off; what it has so far stays. */
const cancel = defineCommand({
  name: "jobs.cancel",
  input: jobInput,
  async run(context, { workspaceId, jobId }) {
    const { tx, member, record, emit } = context;
    const self = await member(workspaceId);
    const job = await jobIn(context, workspaceId, jobId);
    need(mayCancel(self, job), self.role, "call off work that someone else asked for");
    const { count } = await tx.job.updateMany({
      where: { id: jobId, state: { in: [...unfinished] } },
      data: { state: "cancelled" },
    });
    if (count === 0) throw refuse("conflict", "over", "This work is over already.");
    const { dealId } = job;
    await record({ workspaceId, dealId, kind: "job.cancelled", subjectKind: "job", subjectId: jobId });
    await emit({ workspaceId, dealId, kind: "job.cancelled", payload: { jobId } });
    return null;
  },
});

/** @throws Refusal "limited" when a person or the workspace has as much waiting as is fair to the others. */
async function refuseCrowding({ tx, actor }: QueryContext, workspaceId: string): Promise<void> {
  const waiting = await tx.job.groupBy({
    by: ["createdById"],
    where: { workspaceId, state: { in: [...unfinished] } },
    _count: true,
  });
  const own = waiting.find(({ createdById }) => createdById === actor.userId)?._count ?? 0;
  if (own >= MOST_PER_PERSON)
    throw refuse(
      "limited",
      "tooManyJobs",
      `You have ${own} pieces of work under way: wait for one to end, or call one off.`,
    );
  if (waiting.reduce((sum, { _count }) => sum + _count, 0) >= MOST_PER_WORKSPACE)
    throw refuse(
      "limited",
      "tooManyJobs",
      `This workspace has ${MOST_PER_WORKSPACE} pieces of work under way: wait for one to end.`,
    );
}

/** The oldest ended work of a deal gives way. */
async function dropOld({ tx }: QueryContext, dealId: string): Promise<void> {
  const kept = await tx.job.findMany({
    where: { dealId },
    orderBy: { createdAt: "desc" },
    skip: KEPT_PER_DEAL,
    select: { id: true, state: true },
  });
  const old = kept.filter(({ state }) => !isUnfinished(state)).map(({ id }) => id);
  await tx.job.deleteMany({ where: { id: { in: old } } });
}

/** The job, if it is the workspace's. */
export async function jobIn({ tx }: QueryContext, workspaceId: string, jobId: string) {
  const job = await tx.job.findFirst({ where: { id: jobId, workspaceId } });
  if (!job) throw notFound("work");
  return job;
}

export const commands = { start, cancel };
