import { randomUUID } from "node:crypto";
import { priceOnServer } from "../compute/serverPool";
import { dealPath } from "../deals/check";
import { dealIn } from "../deals/find";
import { queries as dealQueries } from "../deals/queries";
import { notifyFollowers } from "../notices/notify";
import { Refusal, refuse } from "../platform/errors";
import { defineCommand } from "../platform/operation";
import { canonicalJson } from "../pricing/canonical";
import type { PricingReport } from "../pricing/report";
import { mayWork, need } from "../workspaces/policy";
import { queries as workspaceQueries } from "../workspaces/queries";
import { queries as runQueries } from "./queries";
import { priceInput, runInput } from "./schema";
import { packed } from "./stored";

interface Priced {
  readonly version: number;
  readonly request: string;
  readonly report: string;
  readonly milliseconds: number;
}

/** Prices the deal's saved version in a thread of its own and keeps request and report for ever. */
const price = defineCommand({
  name: "runs.price",
  input: priceInput,
  async prepare({ workspaceId, dealId, version }, ask, actor): Promise<Priced> {
    const { may, role } = await ask(workspaceQueries.open, { workspaceId });
    need(may.work, role, "price a run");
    const deal = await ask(dealQueries.request, { workspaceId, dealId });
    if (deal.version !== version) throw changedMeanwhile();
    const answer = await priceOnServer(deal.request, actor.userId);
    if (!answer.ok)
      throw new Refusal(
        "invalid",
        answer.problems.map((problem) => ({ ...problem, path: dealPath(problem.path) })),
      );
    return {
      version,
      request: canonicalJson(deal.request),
      report: answer.report,
      milliseconds: answer.milliseconds,
    };
  },
  async run(context, { workspaceId, dealId, note }, priced) {
    const { tx, actor, now, member, record, emit } = context;
    const self = await member(workspaceId);
    need(mayWork(self), self.role, "price a run");
    await dealIn(context, workspaceId, dealId, true);
    const last = await tx.run.findFirst({
      where: { dealId },
      orderBy: { number: "desc" },
      select: { number: true },
    });
    const number = (last?.number ?? 0) + 1;
    const report = JSON.parse(priced.report) as PricingReport;
    const id = randomUUID();
    const summary = {
      expectedLoss: report.pool.expectedLoss,
      parSpread: report.pool.parSpread,
      warnings: report.warnings.length,
    };
    await tx.run.create({
      data: {
        id,
        workspaceId,
        dealId,
        number,
        dealVersion: priced.version,
        requestHash: report.requestHash,
        engine: `${report.engine.name} ${report.engine.version}`,
        request: packed(priced.request),
        report: packed(priced.report),
        summary,
        note,
        milliseconds: priced.milliseconds,
        createdById: actor.userId,
        createdAt: now,
      },
    });
    await record({
      workspaceId,
      dealId,
      kind: "run.priced",
      subjectKind: "run",
      subjectId: id,
      after: { number, requestHash: report.requestHash, note },
    });
    await emit({ workspaceId, dealId, kind: "run.priced", payload: { dealId, runId: id, number } });
    const told = { runId: id, run: number, words: note };
    await notifyFollowers(context, { workspaceId, dealId, kind: "deal.changed", payload: told });
    return { runId: id, number };
  },
});

/** Prices a run's own request again and says whether the report has the same bits. Nothing is written. */
const repeat = defineCommand({
  name: "runs.repeat",
  input: runInput,
  async prepare({ workspaceId, runId }, ask, actor) {
    const { may, role } = await ask(workspaceQueries.open, { workspaceId });
    need(may.work, role, "price a run again");
    const stored = await ask(runQueries.open, { workspaceId, runId });
    const answer = await priceOnServer(stored.request, actor.userId);
    if (!answer.ok) throw new Refusal("invalid", answer.problems);
    const report = JSON.parse(answer.report) as PricingReport;
    return {
      isSame: canonicalJson(report) === canonicalJson(stored.report),
      engineThen: stored.engine,
      engineNow: `${report.engine.name} ${report.engine.version}`,
      milliseconds: answer.milliseconds,
    };
  },
  async run({ member }, { workspaceId }, outcome) {
    const self = await member(workspaceId);
    need(mayWork(self), self.role, "price a run again");
    return outcome;
  },
});

function changedMeanwhile(): Refusal {
  return refuse(
    "conflict",
    "staleVersion",
    "Someone saved a newer version of this deal meanwhile: look at it, then price again.",
  );
}

export const commands = { price, repeat };
