import { currentHash } from "../deals/current";
import { dealIn } from "../deals/find";
import { type DealContent, dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { notFound } from "../platform/errors";
import { defineQuery } from "../platform/operation";
import { runInput } from "./schema";
import { unpackedReport, unpackedRequest } from "./stored";

const list = defineQuery({
  name: "runs.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const hash = await currentHash(context, workspaceId, dealId);
    const runs = await context.tx.run.findMany({
      where: { dealId },
      orderBy: { number: "desc" },
      omit: { request: true, report: true },
    });
    const nameOf = await peopleNames(
      context.tx,
      runs.map((run) => run.createdById),
    );
    return {
      runs: runs.map((run) => ({
        id: run.id,
        number: run.number,
        dealVersion: run.dealVersion,
        isCurrent: run.requestHash === hash,
        requestHash: run.requestHash,
        engine: run.engine,
        note: run.note,
        milliseconds: run.milliseconds,
        by: nameOf(run.createdById),
        at: run.createdAt.toISOString(),
      })),
    };
  },
});

const open = defineQuery({
  name: "runs.open",
  input: runInput,
  async run(context, { workspaceId, runId }) {
    const { tx, member } = context;
    await member(workspaceId);
    const run = await tx.run.findFirst({ where: { id: runId, workspaceId } });
    if (!run) throw notFound("run");
    const version = await tx.dealVersion.findUnique({
      where: { dealId_version: { dealId: run.dealId, version: run.dealVersion } },
    });
    const fields = version?.content as { readonly content?: DealContent } | undefined;
    return {
      id: run.id,
      dealId: run.dealId,
      /** Names of the classes as they were in the version that was priced. */
      classNames: Object.fromEntries((fields?.content?.classes ?? []).map(({ id, name }) => [id, name])),
      number: run.number,
      dealVersion: run.dealVersion,
      requestHash: run.requestHash,
      isCurrent: run.requestHash === (await currentHash(context, workspaceId, run.dealId)),
      engine: run.engine,
      note: run.note,
      at: run.createdAt.toISOString(),
      request: unpackedRequest(run.request),
      report: unpackedReport(run.report),
    };
  },
});

export const queries = { list, open };
