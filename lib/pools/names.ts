import type { PoolName, Prisma } from "@/lib/generated/prisma/client";
import type { Transaction } from "../platform/db/client";
import { Refusal } from "../platform/errors";
import { poolNameProblems } from "../pricing/refusals";
import type { NameInput } from "../pricing/request";

const CHUNK = 2_000;

/** Names by the request's rules. @throws Refusal with every problem; paths are `names.<row>.<field>`. */
export function checkedNames(raw: readonly unknown[]): NameInput[] {
  const problems = poolNameProblems(raw);
  if (problems.length > 0) {
    throw new Refusal(
      "invalid",
      problems.map((problem) => ({ ...problem, path: problem.path.replace(/^pool/, "names") })),
    );
  }
  return raw as NameInput[];
}

/** The names of a pool in their order. */
export async function namesOf(tx: Transaction, poolId: string): Promise<NameInput[]> {
  const rows = await tx.poolName.findMany({ where: { poolId }, orderBy: { position: "asc" } });
  return rows.map(nameOfRow);
}

function nameOfRow({ key, name, sector, notional, recovery, loading, credit }: PoolName): NameInput {
  return {
    id: key,
    ...(name === null ? {} : { name }),
    ...(sector === null ? {} : { sector }),
    notional,
    recovery,
    ...(loading === null ? {} : { loading }),
    credit: credit as NameInput["credit"],
  };
}

/** Replaces a pool's rows, touching only those that changed. @returns how many were added, changed and removed. */
export async function writeNames(
  tx: Transaction,
  poolId: string,
  before: readonly NameInput[],
  after: readonly NameInput[],
) {
  const known = new Map(
    before.map((name, position) => [name.id, JSON.stringify([position, rowOf(poolId, name, position)])]),
  );
  const wanted = after.map((name, position) => ({ name, row: rowOf(poolId, name, position), text: "" }));
  for (const entry of wanted) entry.text = JSON.stringify([entry.row.position, entry.row]);
  const kept = new Set(after.map((name) => name.id));
  const removed = before.filter((name) => !kept.has(name.id)).map((name) => name.id);
  const changed = wanted.filter(({ name, text }) => known.has(name.id) && known.get(name.id) !== text);
  const added = wanted.filter(({ name }) => !known.has(name.id));
  const gone = [...removed, ...changed.map(({ name }) => name.id)];
  for (let i = 0; i < gone.length; i += CHUNK) {
    await tx.poolName.deleteMany({ where: { poolId, key: { in: gone.slice(i, i + CHUNK) } } });
  }
  const written = [...changed, ...added].map(({ row }) => row);
  for (let i = 0; i < written.length; i += CHUNK)
    await tx.poolName.createMany({ data: written.slice(i, i + CHUNK) });
  return { added: added.length, changed: changed.length, removed: removed.length };
}

function rowOf(poolId: string, name: NameInput, position: number): Prisma.PoolNameCreateManyInput {
  return {
    poolId,
    key: name.id,
    position,
    name: name.name ?? null,
    sector: name.sector ?? null,
    notional: name.notional,
    recovery: name.recovery,
    loading: name.loading ?? null,
    credit: name.credit,
  };
}
