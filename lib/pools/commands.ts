import { randomUUID } from "node:crypto";
import { notFound, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand, type QueryContext } from "../platform/operation";
import { asEditor } from "../workspaces/guards";
import { checkedNames, namesOf, writeNames } from "./names";
import { archiveInput, copyInput, createInput, saveInput } from "./schema";

const create = defineCommand({
  name: "pools.create",
  input: createInput,
  async run(context, { workspaceId, name, currency, names: raw }) {
    await asEditor(context, workspaceId, "change pools");
    const names = checkedNames(raw);
    return { poolId: await makePool(context, workspaceId, name, currency, names, "pool.created") };
  },
});

const save = defineCommand({
  name: "pools.save",
  input: saveInput,
  async run(context, { workspaceId, poolId, version, name, currency, names: raw }) {
    await asEditor(context, workspaceId, "change pools");
    const { tx, record, emit } = context;
    const pool = await poolIn(context, workspaceId, poolId, true);
    const before = await namesOf(tx, poolId);
    if (pool.version !== version) {
      throw staleVersion("pool", {
        version: pool.version,
        name: pool.name,
        currency: pool.currency,
        names: before,
      });
    }
    if (pool.archivedAt)
      throw refuse("conflict", "archived", "This pool is archived: restore it, then save.");
    const names = checkedNames(raw);
    const change = await writeNames(tx, poolId, before, names);
    await tx.pool.update({ where: { id: poolId }, data: { name, currency, version: version + 1 } });
    await record({
      workspaceId,
      kind: "pool.saved",
      subjectKind: "pool",
      subjectId: poolId,
      before: { name: pool.name, currency: pool.currency, version },
      after: { name, currency, version: version + 1, ...change },
    });
    await emit({ workspaceId, kind: "pool.saved", payload: { poolId, version: version + 1 } });
    return { version: version + 1 };
  },
});

const copy = defineCommand({
  name: "pools.copy",
  input: copyInput,
  async run(context, { workspaceId, poolId, name }) {
    await asEditor(context, workspaceId, "change pools");
    const pool = await poolIn(context, workspaceId, poolId);
    const names = await namesOf(context.tx, poolId);
    return { poolId: await makePool(context, workspaceId, name, pool.currency, names, "pool.copied") };
  },
});

const archive = defineCommand({
  name: "pools.archive",
  input: archiveInput,
  async run(context, { workspaceId, poolId, archived }) {
    await asEditor(context, workspaceId, "change pools");
    const { tx, now, record, emit } = context;
    await poolIn(context, workspaceId, poolId);
    await tx.pool.update({ where: { id: poolId }, data: { archivedAt: archived ? now : null } });
    const kind = archived ? "pool.archived" : "pool.restored";
    await record({ workspaceId, kind, subjectKind: "pool", subjectId: poolId });
    await emit({ workspaceId, kind, payload: { poolId } });
    return null;
  },
});

async function makePool(
  { tx, actor, now, record, emit }: CommandContext,
  workspaceId: string,
  name: string,
  currency: string,
  names: ReturnType<typeof checkedNames>,
  kind: string,
): Promise<string> {
  const id = randomUUID();
  await tx.pool.create({
    data: { id, workspaceId, name, currency, createdById: actor.userId, createdAt: now },
  });
  await writeNames(tx, id, [], names);
  await record({
    workspaceId,
    kind,
    subjectKind: "pool",
    subjectId: id,
    after: { name, currency, names: names.length },
  });
  await emit({ workspaceId, kind, payload: { poolId: id } });
  return id;
}

/** The pool, if it is the workspace's; locked when it is about to be written. */
export async function poolIn({ tx }: QueryContext, workspaceId: string, poolId: string, isLocked = false) {
  if (isLocked) await tx.$queryRaw`SELECT id FROM "pool" WHERE id = ${poolId} FOR UPDATE`;
  const pool = await tx.pool.findFirst({ where: { id: poolId, workspaceId } });
  if (!pool) throw notFound("pool");
  return pool;
}

export const commands = { create, save, copy, archive };
