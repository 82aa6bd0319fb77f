import { randomUUID } from "node:crypto";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import pg from "pg";
import { afterAll, beforeAll } from "vitest";
import { openEmbedded, openServer, type Store } from "@/lib/platform/db/open";

/**
 * A migrated database of the test file's own: on the server in TEST_DATABASE_URL where that is set, else embedded in a
 * temporary folder. Call at the top of a file; the store is there once tests run, and gone after them.
 */
export function withDatabase(): { readonly store: Store; another(): Promise<Store> } {
  let opened: { store: Store; another?: () => Promise<Store>; drop: () => Promise<void> } | undefined;
  beforeAll(async () => {
    const server = process.env.TEST_DATABASE_URL;
    opened = await (server ? onServer(server) : embedded());
  });
  afterAll(async () => opened?.drop());
  return {
    get store() {
      if (!opened) throw new Error("The database is open only while tests run.");
      return opened.store;
    },
    /** The store as a second process would have it; the same one where only one process may open it. */
    async another() {
      return (await opened?.another?.()) ?? this.store;
    },
  };
}

async function embedded() {
  const folder = mkdtempSync(join(tmpdir(), "loadline-test-"));
  const store = await openEmbedded(folder);
  const drop = async () => {
    await store.close();
    rmSync(folder, { recursive: true, force: true });
  };
  return { store, drop };
}

async function onServer(server: string) {
  const name = `loadline_${randomUUID().replaceAll("-", "")}`;
  await administer(server, `CREATE DATABASE ${name}`);
  const url = new URL(server);
  url.pathname = `/${name}`;
  const store = await openServer(url.href);
  const others: Store[] = [];
  const another = async () => {
    const other = await openServer(url.href);
    others.push(other);
    return other;
  };
  const drop = async () => {
    await Promise.all([store, ...others].map((each) => each.close()));
    await administer(server, `DROP DATABASE ${name} WITH (FORCE)`);
  };
  return { store, another, drop };
}

async function administer(server: string, sql: string): Promise<void> {
  const client = new pg.Client({ connectionString: server });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
}
