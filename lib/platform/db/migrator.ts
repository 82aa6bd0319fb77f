import { createHash, randomUUID } from "node:crypto";
import { readdir, readFile } from "node:fs/promises";
import { join } from "node:path";

/** One database session, whichever mode: several statements at once, or one with parameters. */
export interface MigrationSession {
  exec(sql: string): Promise<void>;
  query(sql: string, parameters: unknown[]): Promise<{ rows: Record<string, unknown>[] }>;
}

/** The advisory lock that every migrator of this table takes. */
const LOCK = 72707369;

const TABLE = `CREATE TABLE IF NOT EXISTS "_prisma_migrations" (
  id VARCHAR(36) PRIMARY KEY NOT NULL, checksum VARCHAR(64) NOT NULL, finished_at TIMESTAMPTZ,
  migration_name VARCHAR(255) NOT NULL, logs TEXT, rolled_back_at TIMESTAMPTZ,
  started_at TIMESTAMPTZ NOT NULL DEFAULT now(), applied_steps_count INTEGER NOT NULL DEFAULT 0)`;

/**
 * Applies the folder's migrations in order, each in a transaction of its own, under a lock, and records them.
 * @returns the names applied now.
 * @throws Error in one sentence when the database is newer, a migration was edited, or one fails.
 */
export async function migrate(session: MigrationSession, folder: string): Promise<string[]> {
  const entries = await readdir(folder, { withFileTypes: true });
  const names = entries
    .filter((entry) => entry.isDirectory())
    .map((entry) => entry.name)
    .sort();
  await session.query("SELECT pg_advisory_lock($1::bigint)", [LOCK]);
  try {
    await session.exec(TABLE);
    const { rows } = await session.query(
      'SELECT migration_name, checksum, finished_at FROM "_prisma_migrations" WHERE rolled_back_at IS NULL',
      [],
    );
    const known = new Map(rows.map((row) => [String(row.migration_name), row]));
    const unknown = [...known.keys()].filter((name) => !names.includes(name));
    if (unknown.length > 0)
      throw new Error(
        `The data was written by a newer Loadline (${unknown.join(", ")}): start that version.`,
      );
    const applied: string[] = [];
    for (const name of names) {
      const sql = await readFile(join(folder, name, "migration.sql"), "utf8");
      const checksum = createHash("sha256").update(sql).digest("hex");
      const row = known.get(name);
      if (row && row.checksum !== checksum)
        throw new Error(`The migration ${name} was edited after it was applied.`);
      if (row) continue;
      await applyOne(session, name, sql, checksum);
      applied.push(name);
    }
    return applied;
  } finally {
    await session.query("SELECT pg_advisory_unlock($1::bigint)", [LOCK]).catch(() => undefined);
  }
}

async function applyOne(
  session: MigrationSession,
  name: string,
  sql: string,
  checksum: string,
): Promise<void> {
  try {
    await session.exec("BEGIN");
    await session.exec(sql);
    await session.query(
      'INSERT INTO "_prisma_migrations"(id, checksum, migration_name, started_at, finished_at, applied_steps_count) VALUES ($1,$2,$3,now(),clock_timestamp(),1)',
      [randomUUID(), checksum, name],
    );
    await session.exec("COMMIT");
  } catch (error) {
    await session.exec("ROLLBACK").catch(() => undefined);
    throw new Error(`The migration ${name} failed: ${error instanceof Error ? error.message : error}`, {
      cause: error,
    });
  }
}
