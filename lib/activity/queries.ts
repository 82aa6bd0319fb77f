import type { Prisma } from "@/lib/generated/prisma/client";
import { peopleNames } from "../platform/accounts/peopleNames";
import { toCsv } from "../platform/csv";
import { defineQuery, type QueryContext } from "../platform/operation";
import { exportInput, listInput } from "./schema";
import { activityWords, fieldChanges } from "./words";

const PAGE = 100;
const MOST_EXPORTED = 20_000;

interface Chosen {
  readonly workspaceId: string;
  readonly dealId?: string | undefined;
  readonly personId?: string | undefined;
  readonly room?: string | undefined;
}

/** What changed, newest first, a page at a time. */
const list = defineQuery({
  name: "activity.list",
  input: listInput,
  async run(context, { before, ...chosen }) {
    await context.member(chosen.workspaceId);
    const rows = await context.tx.activity.findMany({
      where: { ...whereOf(chosen), ...(before ? { id: { lt: BigInt(before) } } : {}) },
      orderBy: { id: "desc" },
      take: PAGE,
    });
    return { rows: await shown(context, rows), isLast: rows.length < PAGE };
  },
});

/** Who and which deals the entries can be chosen by. */
const choices = defineQuery({
  name: "activity.choices",
  input: listInput.pick({ workspaceId: true }),
  async run({ tx, member }, { workspaceId }) {
    await member(workspaceId);
    const actors = await tx.activity.findMany({
      where: { workspaceId },
      distinct: ["actorId"],
      select: { actorId: true },
    });
    const nameOf = await peopleNames(
      tx,
      actors.map(({ actorId }) => actorId),
    );
    const deals = await tx.deal.findMany({
      where: { workspaceId },
      select: { id: true, name: true },
      orderBy: { name: "asc" },
    });
    return { people: actors.map(({ actorId }) => ({ id: actorId, name: nameOf(actorId) })), deals };
  },
});

/** The entries chosen as CSV, a line for each field that changed. */
const exported = defineQuery({
  name: "activity.export",
  input: exportInput,
  async run(context, chosen) {
    await context.member(chosen.workspaceId);
    const rows = await context.tx.activity.findMany({
      where: whereOf(chosen),
      orderBy: { id: "desc" },
      take: MOST_EXPORTED,
    });
    const lines = (await shown(context, rows)).flatMap((row) => {
      const changes = row.changes.length > 0 ? row.changes : [{ path: "", before: null, after: null }];
      return changes.map(({ path, before, after }) => [
        row.at,
        row.by,
        row.words,
        row.deal ?? "",
        path,
        cell(before),
        cell(after),
      ]);
    });
    return { csv: toCsv(["When (UTC)", "Who", "What", "Deal", "Field", "Before", "After"], lines) };
  },
});

function cell(value: unknown): string {
  return value === null || value === undefined
    ? ""
    : typeof value === "string"
      ? value
      : JSON.stringify(value);
}

function whereOf({ workspaceId, dealId, personId, room }: Chosen): Prisma.ActivityWhereInput {
  return {
    workspaceId,
    ...(dealId ? { dealId } : {}),
    ...(personId ? { actorId: personId } : {}),
    ...(room ? { kind: { startsWith: `${room}.` } } : {}),
  };
}

type Row = Awaited<ReturnType<QueryContext["tx"]["activity"]["findMany"]>>[number];

async function shown({ tx }: QueryContext, rows: readonly Row[]) {
  const nameOf = await peopleNames(
    tx,
    rows.map(({ actorId }) => actorId),
  );
  const dealIds = [...new Set(rows.flatMap(({ dealId }) => (dealId ? [dealId] : [])))];
  const deals = await tx.deal.findMany({ where: { id: { in: dealIds } }, select: { id: true, name: true } });
  const dealName = new Map(deals.map(({ id, name }) => [id, name]));
  return rows.map(({ id, actorId, kind, dealId, before, after, at }) => ({
    id: String(id),
    by: nameOf(actorId),
    kind,
    words: activityWords(kind),
    dealId,
    deal: dealId ? (dealName.get(dealId) ?? null) : null,
    changes: fieldChanges(before ?? {}, after ?? {}),
    at: at.toISOString(),
  }));
}

export const queries = { list, choices, exported };
