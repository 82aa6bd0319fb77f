import { startPostgres } from "./postgres";
import type { StageResult } from "./summary";
import { vitestStage } from "./vitest";

/** The service tests on the embedded database, then the same ones on a PostgreSQL server where one can be had. */
export async function serviceStages(): Promise<StageResult[]> {
  const embedded = await vitestStage("service, embedded", ["tests/service"], { TEST_DATABASE_URL: "" });
  const name = "service, PostgreSQL server";
  const server = await startPostgres();
  if (server === null) {
    const remark = "no PostgreSQL server found: set TEST_DATABASE_URL, or install the package postgresql";
    const failed = process.env.CI ? 1 : 0;
    return [embedded, { name, passed: 0, failed, skipped: 0, seconds: 0, remark }];
  }
  try {
    return [embedded, await vitestStage(name, ["tests/service"], { TEST_DATABASE_URL: server.url })];
  } finally {
    await server.stop();
  }
}
