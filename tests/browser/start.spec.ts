import { mkdtempSync, rmSync } from "node:fs";
import { createServer } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { expect, test } from "@playwright/test";
import { openEmbedded } from "@/lib/platform/db/open";
import { failedStart, freePort, startApp } from "./support/appProcess";

const folders: string[] = [];
const aFolder = () => {
  const folder = mkdtempSync(join(tmpdir(), "loadline-start-"));
  folders.push(folder);
  return folder;
};

test.afterAll(() => {
  for (const folder of folders) rmSync(folder, { recursive: true, force: true });
});

/** One sentence, not a stack. */
async function expectSentence(settings: Record<string, string>, words: RegExp): Promise<void> {
  const { code, said } = await failedStart(settings);
  expect(code).toBe(1);
  expect(said).toMatch(words);
  expect(said.split("\n")).toHaveLength(1);
}

test("a busy port, wrong settings and an unreachable server each give one sentence and exit code 1", async () => {
  const PORT = await freePort();
  const server = createServer().listen(Number(PORT), "localhost");
  await expectSentence({ PORT, DATA_DIR: aFolder() }, new RegExp(`port ${PORT}`, "i"));
  server.close();
  await expectSentence(
    { PORT: "x", SMTP_URL: "ftp://a", DATA_DIR: aFolder() },
    /PORT must be a number; .*SMTP_URL must start with/,
  );
  const unreachable = "postgresql://nobody@localhost:1/none";
  await expectSentence(
    { PORT: await freePort(), DATA_DIR: aFolder(), DATABASE_URL: unreachable },
    /The database server in DATABASE_URL cannot be reached/,
  );
});

test("a locked data folder and one written by a newer Loadline each give one sentence and exit code 1", async () => {
  const DATA_DIR = aFolder();
  const store = await openEmbedded(DATA_DIR);
  await store.database
    .$executeRaw`INSERT INTO "_prisma_migrations" (id, checksum, migration_name) VALUES ('x', 'x', '29990101000000_later')`;
  await expectSentence({ PORT: await freePort(), DATA_DIR }, /is in use by another Loadline \(process \d+\)/);
  await store.close();
  await expectSentence(
    { PORT: await freePort(), DATA_DIR },
    /written by a newer Loadline \(29990101000000_later\)/,
  );
});

test("health tells version and store once it serves, a later start takes under 8 seconds, and Ctrl-C ends it cleanly", async () => {
  const settings = { PORT: await freePort(), DATA_DIR: aFolder() };
  const first = await startApp(settings);
  const health = await (await fetch(`${first.address}/api/health`)).json();
  expect(health).toMatchObject({ version: expect.any(String), store: "embedded" });
  expect(await first.kill("SIGINT")).toBe(0);
  const began = Date.now();
  const again = await startApp(settings);
  const seconds = (Date.now() - began) / 1_000;
  test.info().annotations.push({ type: "seconds of a later start", description: seconds.toFixed(1) });
  expect(seconds).toBeLessThan(8);
  expect(await again.kill("SIGINT")).toBe(0);
});
