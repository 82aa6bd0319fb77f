import { readFileSync } from "node:fs";
import { join } from "node:path";
import { commands as dealCommands } from "@/lib/deals/commands";
import { commands as discussionCommands } from "@/lib/discussion/commands";
import { commands as marketCommands } from "@/lib/markets/commands";
import type { Actor } from "@/lib/platform/accounts/actor";
import { auth } from "@/lib/platform/accounts/auth";
import { store } from "@/lib/platform/db/store";
import { execute } from "@/lib/platform/run";
import { commands as poolCommands } from "@/lib/pools/commands";
import { readPool } from "@/lib/pools/import/read";
import { commands as runCommands } from "@/lib/runs/commands";
import { commands as workspaceCommands } from "@/lib/workspaces/commands";

const FOLDER = join(process.cwd(), "seed");

interface DemoFile {
  readonly market: { readonly content: object };
  /** Quotes of Harbour 125: the engine's own prices on an invented base curve, each moved by a few hundredths of a percent. */
  readonly quoted: object;
  readonly tranched: Record<string, unknown>;
  readonly basket: Record<string, unknown>;
  readonly onBaseCurve: Record<string, unknown>;
  readonly talk: readonly string[];
}

/** Makes the demo's two people and their workspace from the plain data files beside this one. */
export async function plant(email: string, password: string): Promise<void> {
  const structurer = await signUp("Ines Harbour", email, password);
  const analyst = await signUp("Tomas Quay", "analyst@demo.invalid", password);
  const { database } = await store();
  const asStructurer = { database, actor: structurer };
  const asAnalyst = { database, actor: analyst };
  const demo = JSON.parse(readFileSync(join(FOLDER, "deals.json"), "utf8")) as DemoFile;
  const { workspaceId } = await execute(workspaceCommands.create, { name: "Demo desk" }, asStructurer);
  const { link } = await execute(workspaceCommands.invite, { workspaceId, role: "analyst" }, asStructurer);
  await execute(workspaceCommands.join, { token: link.split("/").at(-1) }, asAnalyst);
  const pool = async (file: string, name: string, isTaken = (_: unknown, _i: number) => true) => {
    const { rows } = readPool(readFileSync(join(FOLDER, file), "utf8"));
    const names = rows.map((row) => row.name).filter(isTaken);
    return execute(poolCommands.create, { workspaceId, name, currency: "EUR", names }, asStructurer);
  };
  const wide = await pool("pool.csv", "Harbour 125");
  const ten = await pool("basket.csv", "Ten names");
  const half = await pool("pool.csv", "Every other of Harbour", (_, i) => i % 2 === 0);
  const { content, ...market } = demo.market;
  const quotedPools = [{ ...demo.quoted, poolId: wide.poolId }];
  const { marketId } = await execute(
    marketCommands.create,
    { workspaceId, ...market, content: { ...content, quotedPools } },
    asStructurer,
  );
  const deal = (fields: Record<string, unknown>, poolId: string) =>
    execute(dealCommands.create, { workspaceId, marketId, poolId, ...fields }, asStructurer);
  const tranched = await deal(demo.tranched, wide.poolId);
  const basket = await deal(demo.basket, ten.poolId);
  await deal(demo.onBaseCurve, half.poolId);
  for (const { dealId } of [tranched, basket]) {
    await execute(runCommands.price, { workspaceId, dealId, version: 1, note: "First look" }, asStructurer);
  }
  const { threadId } = await execute(
    discussionCommands.start,
    { workspaceId, dealId: tranched.dealId, body: demo.talk[0] },
    asStructurer,
  );
  await execute(discussionCommands.reply, { workspaceId, threadId, body: demo.talk[1] }, asAnalyst);
}

async function signUp(name: string, email: string, password: string): Promise<Actor> {
  const { user } = await (await auth()).api.signUpEmail({ body: { name, email, password } });
  return { userId: user.id, name, email };
}
