import { commands as deals } from "@/lib/deals/commands";
import { commands as markets } from "@/lib/markets/commands";
import type { Actor, Role } from "@/lib/platform/accounts/actor";
import type { Database } from "@/lib/platform/db/client";
import { execute } from "@/lib/platform/run";
import { commands as pools } from "@/lib/pools/commands";
import type { PricingRequest } from "@/lib/pricing/request";
import { commands as workspaces } from "@/lib/workspaces/commands";

/** A person known to the store, without a password. */
export async function aPerson(database: Database, name: string): Promise<Actor> {
  const userId = `user-${name}-${Math.random().toString(36).slice(2)}`;
  const email = `${userId}@test.invalid`;
  await database.user.create({ data: { id: userId, name, email } });
  return { userId, name, email };
}

/** A name of a pool, all alike unless told. */
export function aName(id: string) {
  return { id, notional: 1_000_000, recovery: 0.4, credit: { kind: "hazard", rate: 0.02 } };
}

export const aMarketContent = {
  discount: { kind: "flat", rate: 0.03 },
  schedule: { kind: "even", perYear: 4 },
};

export const aDealContent = {
  maturity: null,
  years: 5,
  law: "finite",
  correlation: { kind: "flat", rho: 0.3 },
  classes: [
    { id: "E", name: "First", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.2 },
    { id: "M", name: "Second", attachment: 0.1, detachment: 0.3, running: 0.01 },
  ],
  nthToDefault: [1],
  notes: "",
};

/** A request of `count` names alike, and the two classes of the deal. */
export function aRequest(count = 3): PricingRequest {
  return {
    format: 1,
    currency: "EUR",
    schedule: { kind: "even", years: 5, perYear: 4 },
    discount: { kind: "flat", rate: 0.03 },
    pool: Array.from({ length: count }, (_, i) => aName(`N${i}`) as PricingRequest["pool"][number]),
    correlation: { kind: "flat", rho: 0.3 },
    tranches: aDealContent.classes.map(({ name: _name, ...tranche }) => tranche),
  };
}

/** A stress grid of two by two. */
export const aGrid = { spreads: { kind: "relative", steps: [0, 1] }, correlations: [0, 0.1], shock: {} };

/** A workspace with a member of every role, a pool, a market and a deal. */
export async function aWorld(database: Database) {
  const owner = await aPerson(database, "owner");
  const as = (actor: Actor) => ({ database, actor });
  const { workspaceId } = await execute(workspaces.create, { name: "Test desk" }, as(owner));
  const people: Record<Role, Actor> = { owner, structurer: owner, analyst: owner, viewer: owner };
  for (const role of ["structurer", "analyst", "viewer"] as const) {
    people[role] = await aPerson(database, role);
    const { link } = await execute(workspaces.invite, { workspaceId, role }, as(owner));
    await execute(workspaces.join, { token: link.split("/").at(-1) }, as(people[role]));
  }
  const names = Array.from({ length: 10 }, (_, i) => aName(`N${i}`));
  const { poolId } = await execute(
    pools.create,
    { workspaceId, name: "Pool", currency: "EUR", names },
    as(owner),
  );
  const market = { workspaceId, name: "Market", pricingDate: "2026-12-01", content: aMarketContent };
  const { marketId } = await execute(markets.create, market, as(owner));
  const deal = { workspaceId, name: "Deal", poolId, marketId, content: aDealContent };
  const { dealId } = await execute(deals.create, deal, as(owner));
  return { workspaceId, people, poolId, marketId, dealId, stranger: await aPerson(database, "stranger") };
}
