import { join } from "node:path";
import { PrismaPg } from "@prisma/adapter-pg";
import pg from "pg";
import { PrismaPGlite } from "pglite-prisma-adapter";
import { PrismaClient } from "@/lib/generated/prisma/client";
import type { Database } from "./client";
import { openDurable } from "./durableFolder";
import { lockFolder } from "./folderLock";
import { migrate } from "./migrator";

/** An open store: the client, how to hear notifications, how to close. */
export interface Store {
  readonly mode: "embedded" | "server";
  readonly database: Database;
  /** Calls back with each payload sent to the channel; resolves with the stop. */
  listen(channel: string, heard: (payload: string) => void): Promise<() => Promise<void>>;
  /** Runs plain SQL beside the client, for a library that brings its own statements; without values there may be several. */
  sql(text: string, values?: readonly unknown[]): Promise<{ rows: Record<string, unknown>[] }>;
  close(): Promise<void>;
}

const MIGRATIONS = join(process.cwd(), "prisma", "migrations");
const TRANSACTIONS = { maxWait: 20_000, timeout: 60_000 };

/** Opens the embedded database in a folder, locked against other processes, and migrates it. */
export async function openEmbedded(folder: string): Promise<Store> {
  const unlock = await lockFolder(folder);
  try {
    const client = await openDurable(join(folder, "database"));
    await migrate(
      {
        exec: async (sql) => void (await client.exec(sql)),
        query: (sql, values) => client.query(sql, values),
      },
      MIGRATIONS,
    );
    const database = new PrismaClient({
      adapter: new PrismaPGlite(client),
      transactionOptions: TRANSACTIONS,
    });
    return {
      mode: "embedded",
      database,
      listen: async (channel, heard) => client.listen(channel, heard),
      sql: async (text, values) => {
        if (values) return client.query(text, [...values]);
        const results = await client.exec(text);
        return { rows: results.at(-1)?.rows ?? [] };
      },
      close: async () => {
        await database.$disconnect();
        await client.close().catch(() => undefined);
        await unlock();
      },
    };
  } catch (error) {
    await unlock();
    throw error;
  }
}

/** Connects to a PostgreSQL server and migrates it; every session speaks UTC. */
export async function openServer(url: string): Promise<Store> {
  const session = new pg.Client({ connectionString: url });
  try {
    await session.connect();
  } catch (error) {
    const reason = error instanceof Error && error.message ? error.message : "no answer";
    throw new Error(`The database server in DATABASE_URL cannot be reached: ${reason}.`, { cause: error });
  }
  try {
    await migrate(
      {
        exec: async (sql) => void (await session.query(sql)),
        query: (sql, values) => session.query(sql, values),
      },
      MIGRATIONS,
    );
  } finally {
    await session.end();
  }
  const adapter = new PrismaPg({ connectionString: url, options: "-c timezone=UTC", max: 10 });
  const database = new PrismaClient({ adapter, transactionOptions: TRANSACTIONS });
  const plain = new pg.Pool({ connectionString: url, options: "-c timezone=UTC", max: 3 });
  plain.on("error", () => undefined);
  return {
    mode: "server",
    database,
    listen: (channel, heard) => listenOnServer(url, channel, heard),
    sql: (text, values) => plain.query(text, values && [...values]),
    close: async () => {
      await plain.end();
      await database.$disconnect();
    },
  };
}

/** A dedicated session that listens and comes back after a lost connection. */
async function listenOnServer(
  url: string,
  channel: string,
  heard: (payload: string) => void,
): Promise<() => Promise<void>> {
  let isStopped = false;
  let session: pg.Client | null = null;
  const connect = async (): Promise<void> => {
    const client = new pg.Client({ connectionString: url });
    client.on("notification", (message) => heard(message.payload ?? ""));
    client.on("error", () => undefined);
    client.on("end", () => {
      if (!isStopped) setTimeout(() => void connect().catch(() => undefined), 1_000).unref();
    });
    await client.connect();
    await client.query(`LISTEN ${channel}`);
    session = client;
    heard("");
  };
  await connect();
  return async () => {
    isStopped = true;
    await session?.end();
  };
}
