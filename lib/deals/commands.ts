import { randomUUID } from "node:crypto";
import { marketIn } from "../markets/commands";
import { notifyFollowers } from "../notices/notify";
import { notFound, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand, type QueryContext } from "../platform/operation";
import { poolIn } from "../pools/commands";
import { asEditor } from "../workspaces/guards";
import { checkDeal } from "./check";
import { dealIn } from "./find";
import { partsOf } from "./parts";
import { archiveInput, copyInput, createInput, type DealContent, saveInput, versionInput } from "./schema";

const create = defineCommand({
  name: "deals.create",
  input: createInput,
  async run(context, { workspaceId, ...deal }) {
    await asEditor(context, workspaceId, "change deals");
    await checkParts(context, workspaceId, deal);
    return { dealId: await makeDeal(context, workspaceId, deal, "deal.created") };
  },
});

const save = defineCommand({
  name: "deals.save",
  input: saveInput,
  async run(context, { workspaceId, dealId, version, ...deal }) {
    await asEditor(context, workspaceId, "change deals");
    const before = await dealIn(context, workspaceId, dealId, true);
    if (before.version !== version) throw staleVersion("deal", snapshot(before));
    await checkParts(context, workspaceId, deal);
    await writeVersion(context, workspaceId, before, deal, "deal.saved");
    return { version: version + 1 };
  },
});

const restoreVersion = defineCommand({
  name: "deals.restoreVersion",
  input: versionInput,
  async run(context, { workspaceId, dealId, version }) {
    await asEditor(context, workspaceId, "change deals");
    const before = await dealIn(context, workspaceId, dealId, true);
    const old = await context.tx.dealVersion.findUnique({ where: { dealId_version: { dealId, version } } });
    if (!old) throw notFound("version");
    const deal = old.content as unknown as DealFields;
    await checkParts(context, workspaceId, deal);
    await writeVersion(context, workspaceId, before, deal, "deal.versionRestored");
    return { version: before.version + 1 };
  },
});

const copy = defineCommand({
  name: "deals.copy",
  input: copyInput,
  async run(context, { workspaceId, dealId, name }) {
    await asEditor(context, workspaceId, "change deals");
    const { poolId, marketId, content } = await dealIn(context, workspaceId, dealId);
    const deal = { name, poolId, marketId, content: content as DealContent };
    return { dealId: await makeDeal(context, workspaceId, deal, "deal.copied") };
  },
});

const archive = defineCommand({
  name: "deals.archive",
  input: archiveInput,
  async run(context, { workspaceId, dealId, archived }) {
    await asEditor(context, workspaceId, "change deals");
    const { tx, now, record, emit } = context;
    await dealIn(context, workspaceId, dealId);
    await tx.deal.update({ where: { id: dealId }, data: { archivedAt: archived ? now : null } });
    const kind = archived ? "deal.archived" : "deal.restored";
    await record({ workspaceId, kind, subjectKind: "deal", subjectId: dealId, dealId });
    await emit({ workspaceId, dealId, kind, payload: { dealId } });
    return null;
  },
});

/** What a version of a deal holds. */
export interface DealFields {
  readonly name: string;
  readonly poolId: string;
  readonly marketId: string;
  readonly content: DealContent;
}

type DealRow = Awaited<ReturnType<typeof dealIn>>;

function snapshot({ name, poolId, marketId, content, version }: DealRow) {
  return { version, name, poolId, marketId, content: content as DealContent };
}

/** Pool and market must be the workspace's own, and everything must fit together. */
async function checkParts(
  context: QueryContext,
  workspaceId: string,
  { poolId, marketId, content }: DealFields,
): Promise<void> {
  const pool = await poolIn(context, workspaceId, poolId).catch(() => null);
  const market = await marketIn(context, workspaceId, marketId).catch(() => null);
  if (!pool) throw refuse("invalid", "noPool", "Choose a pool of this workspace.", "poolId");
  if (!market) throw refuse("invalid", "noMarket", "Choose a market of this workspace.", "marketId");
  checkDeal({ ...(await partsOf(context, workspaceId, poolId, marketId)), content });
}

async function makeDeal(
  { tx, actor, now, record, emit }: CommandContext,
  workspaceId: string,
  deal: DealFields,
  kind: string,
): Promise<string> {
  const id = randomUUID();
  await tx.deal.create({
    data: {
      id,
      workspaceId,
      ...deal,
      createdById: actor.userId,
      createdAt: now,
      versions: { create: { version: 1, content: deal as never, savedById: actor.userId, savedAt: now } },
    },
  });
  await record({ workspaceId, dealId: id, kind, subjectKind: "deal", subjectId: id, after: deal });
  await emit({ workspaceId, dealId: id, kind, payload: { dealId: id } });
  return id;
}

async function writeVersion(
  context: CommandContext,
  workspaceId: string,
  before: DealRow,
  deal: DealFields,
  kind: string,
) {
  const { tx, actor, now, record, emit } = context;
  const version = before.version + 1;
  await tx.deal.update({ where: { id: before.id }, data: { ...deal, version } });
  await tx.dealVersion.create({
    data: { dealId: before.id, version, content: deal as never, savedById: actor.userId, savedAt: now },
  });
  await record({
    workspaceId,
    dealId: before.id,
    kind,
    subjectKind: "deal",
    subjectId: before.id,
    before: snapshot(before),
    after: { ...deal, version },
  });
  await emit({ workspaceId, dealId: before.id, kind, payload: { dealId: before.id, version } });
  const payload = { version, words: deal.name };
  await notifyFollowers(context, { workspaceId, dealId: before.id, kind: "deal.changed", payload });
}

export const commands = { create, save, restoreVersion, copy, archive };
