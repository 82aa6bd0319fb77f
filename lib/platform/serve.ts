import { currentActor } from "./accounts/auth";
import { store } from "./db/store";
import type { Command, Query } from "./operation";
import { execute } from "./run";

/** Runs one operation for whoever the request's cookies say is signed in. @throws Refusal */
export async function serve<Input, Output, Prepared>(
  operation: Command<string, Input, Output, Prepared> | Query<string, Input, Output>,
  raw: unknown,
  headers: Headers,
): Promise<Output> {
  const { database } = await store();
  return execute(operation, raw, { database, actor: await currentActor(headers) });
}

/** Whether the store answers, and which it is. */
export async function storeHealth(): Promise<"embedded" | "server"> {
  const { database, mode } = await store();
  await database.$queryRaw`SELECT 1`;
  return mode;
}
