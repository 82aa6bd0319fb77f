import { spawn } from "node:child_process";
import { randomUUID } from "node:crypto";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import pg from "pg";
import { describe, expect, it } from "vitest";
import { pendingSql } from "@/lib/platform/db/author";
import { fsyncs } from "@/lib/platform/db/durableFolder";
import { openEmbedded, openServer, type Store } from "@/lib/platform/db/open";
import { execute } from "@/lib/platform/run";
import { commands as workspaces } from "@/lib/workspaces/commands";
import { aPerson } from "../support/world";

const ENOUGH = 40;

/** Runs the writer until it has had enough acknowledged, kills it with -9, and says what it had acknowledged. */
function killedInMidWrite(mode: "server" | "embedded", place: string): Promise<string[]> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, ["--import", "tsx", "tests/support/writer.ts", mode, place], {
      stdio: ["ignore", "pipe", "inherit"],
    });
    let text = "";
    child.stdout.on("data", (data) => {
      text += data;
      if (text.split("\n").length > ENOUGH) child.kill("SIGKILL");
    });
    child.once("error", reject);
    child.once("exit", () => resolve(text.split("\n").slice(0, -1)));
  });
}

async function missing(store: Store, acknowledged: readonly string[]): Promise<string[]> {
  const rows = await store.database.workspace.findMany({ select: { id: true } });
  const kept = new Set(rows.map((row) => row.id));
  return acknowledged.filter((id) => !kept.has(id));
}

describe("STORE: a process killed with -9 loses no acknowledged write", () => {
  it.skipIf(process.env.TEST_DATABASE_URL)("embedded, and a commit is forced to the disk", async () => {
    const folder = mkdtempSync(join(tmpdir(), "loadline-durable-"));
    const acknowledged = await killedInMidWrite("embedded", folder);
    expect(acknowledged.length).toBeGreaterThanOrEqual(ENOUGH);
    const store = await openEmbedded(folder);
    expect(await missing(store, acknowledged)).toEqual([]);
    await expect(openEmbedded(folder)).rejects.toThrow(/in use by another Loadline/);
    const actor = await aPerson(store.database, "after");
    const before = fsyncs.count;
    await execute(workspaces.create, { name: "One more" }, { database: store.database, actor });
    expect(fsyncs.count).toBeGreaterThan(before);
    await store.close();
    rmSync(folder, { recursive: true, force: true });
  });

  it.runIf(process.env.TEST_DATABASE_URL)("on a PostgreSQL server", async () => {
    const server = process.env.TEST_DATABASE_URL!;
    const name = `loadline_${randomUUID().replaceAll("-", "")}`;
    const client = new pg.Client({ connectionString: server });
    await client.connect();
    await client.query(`CREATE DATABASE ${name}`);
    const url = new URL(server);
    url.pathname = `/${name}`;
    const acknowledged = await killedInMidWrite("server", url.href);
    const store = await openServer(url.href);
    expect(await missing(store, acknowledged)).toEqual([]);
    await store.close();
    await client.query(`DROP DATABASE ${name} WITH (FORCE)`);
    await client.end();
  });
});

describe("STORE: migrations and schema", () => {
  it("agree: nothing is left to migrate", async () => {
    expect(await pendingSql()).toBe("");
  });
});
