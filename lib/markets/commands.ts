import { randomUUID } from "node:crypto";
import { notFound, Refusal, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand, type QueryContext } from "../platform/operation";
import { asEditor } from "../workspaces/guards";
import { marketProblems } from "./check";
import { archiveInput, copyInput, createInput, type MarketContent, saveInput } from "./schema";
import { solveQuotes, withQuotes } from "./solveQuotes";

const create = defineCommand({
  name: "markets.create",
  input: createInput,
  prepare: (input, ask, actor) => solveQuotes(input, ask, actor),
  async run(context, { workspaceId, name, pricingDate, content: typed }, quotedPools) {
    await asEditor(context, workspaceId, "change markets");
    const content = withQuotes(typed, quotedPools);
    checkMarket(pricingDate, content);
    return { marketId: await makeMarket(context, workspaceId, name, pricingDate, content) };
  },
});

const save = defineCommand({
  name: "markets.save",
  input: saveInput,
  prepare: (input, ask, actor) => solveQuotes(input, ask, actor),
  async run(context, { workspaceId, marketId, version, name, pricingDate, content: typed }, quotedPools) {
    await asEditor(context, workspaceId, "change markets");
    const content = withQuotes(typed, quotedPools);
    const { tx, record, emit } = context;
    const before = await marketIn(context, workspaceId, marketId, true);
    if (before.version !== version) {
      const { name: savedName, pricingDate: savedDate, content: savedContent } = before;
      throw staleVersion("market", {
        version: before.version,
        name: savedName,
        pricingDate: savedDate,
        content: savedContent,
      });
    }
    if (before.archivedAt)
      throw refuse("conflict", "archived", "This market is archived: restore it, then save.");
    checkMarket(pricingDate, content);
    await tx.market.update({
      where: { id: marketId },
      data: { name, pricingDate, content, version: version + 1 },
    });
    await record({
      workspaceId,
      kind: "market.saved",
      subjectKind: "market",
      subjectId: marketId,
      before: { name: before.name, pricingDate: before.pricingDate, content: before.content },
      after: { name, pricingDate, content },
    });
    await emit({ workspaceId, kind: "market.saved", payload: { marketId, version: version + 1 } });
    return { version: version + 1 };
  },
});

const copy = defineCommand({
  name: "markets.copy",
  input: copyInput,
  async run(context, { workspaceId, marketId, name, pricingDate }) {
    await asEditor(context, workspaceId, "change markets");
    const market = await marketIn(context, workspaceId, marketId);
    const content = market.content as MarketContent;
    checkMarket(pricingDate, content);
    return { marketId: await makeMarket(context, workspaceId, name, pricingDate, content) };
  },
});

const archive = defineCommand({
  name: "markets.archive",
  input: archiveInput,
  async run(context, { workspaceId, marketId, archived }) {
    await asEditor(context, workspaceId, "change markets");
    const { tx, now, record, emit } = context;
    await marketIn(context, workspaceId, marketId);
    await tx.market.update({ where: { id: marketId }, data: { archivedAt: archived ? now : null } });
    const kind = archived ? "market.archived" : "market.restored";
    await record({ workspaceId, kind, subjectKind: "market", subjectId: marketId });
    await emit({ workspaceId, kind, payload: { marketId } });
    return null;
  },
});

async function makeMarket(
  { tx, actor, now, record, emit }: CommandContext,
  workspaceId: string,
  name: string,
  pricingDate: string,
  content: MarketContent,
): Promise<string> {
  const id = randomUUID();
  await tx.market.create({
    data: { id, workspaceId, name, pricingDate, content, createdById: actor.userId, createdAt: now },
  });
  await record({
    workspaceId,
    kind: "market.created",
    subjectKind: "market",
    subjectId: id,
    after: { name, pricingDate, content },
  });
  await emit({ workspaceId, kind: "market.created", payload: { marketId: id } });
  return id;
}

/** @throws Refusal with every problem at once. */
function checkMarket(pricingDate: string, content: MarketContent): void {
  const problems = marketProblems(pricingDate, content);
  if (problems.length > 0) throw new Refusal("invalid", problems);
}

/** The market, if it is the workspace's; locked when it is about to be written. */
export async function marketIn(
  { tx }: QueryContext,
  workspaceId: string,
  marketId: string,
  isLocked = false,
) {
  if (isLocked) await tx.$queryRaw`SELECT id FROM "market" WHERE id = ${marketId} FOR UPDATE`;
  const market = await tx.market.findFirst({ where: { id: marketId, workspaceId } });
  if (!market) throw notFound("market");
  return market;
}

export const commands = { create, save, copy, archive };
