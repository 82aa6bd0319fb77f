import { randomUUID } from "node:crypto";
import type { Browser, Page } from "@playwright/test";
import type { Desk } from "./desk";
import { expect } from "./desk";

/** Someone else in the same workspace, in a browser of their own. */
export async function aColleague(
  browser: Browser,
  desk: Desk,
  baseURL: string | undefined,
  name: string,
  role: "structurer" | "analyst" | "viewer",
): Promise<Page> {
  const context = await browser.newContext({ ...(baseURL ? { baseURL } : {}) });
  const headers = { origin: baseURL ?? "" };
  const data = { name, email: `${randomUUID()}@example.test`, password: "a long enough one" };
  const signedUp = await context.request.post("/api/accounts/sign-up/email", { data, headers });
  expect(signedUp.ok()).toBe(true);
  const { link } = await desk.call("workspaces.invite", { role, email: "" });
  const token = String(link).split("/").pop();
  const joined = await context.request.post("/api/v1/workspaces.join", { data: { token }, headers });
  expect(joined.ok(), await joined.text()).toBe(true);
  return context.newPage();
}

const NAMES = 12;

/** A deal of a dozen names in two classes, made without a screen. */
export async function aStoredDeal(desk: Desk, correlation: unknown = { kind: "flat", rho: 0.3 }) {
  const names = Array.from({ length: NAMES }, (_, i) => ({
    id: `N${i + 1}`,
    name: `Name ${i + 1}`,
    sector: i % 2 === 0 ? "Ports" : "Mills",
    notional: 10_000_000,
    recovery: 0.4,
    credit: { kind: "spread", nodes: [{ years: 5, spread: 0.01 + 0.001 * i }] },
  }));
  const { poolId } = await desk.call("pools.create", { name: "Dozen", currency: "EUR", names });
  const content = { discount: { kind: "flat", rate: 0.03 }, schedule: { kind: "standard", holidays: [] } };
  const { marketId } = await desk.call("markets.create", {
    name: "Flat",
    pricingDate: "2026-12-01",
    content,
  });
  const deal = {
    maturity: "2031-12-20",
    years: null,
    law: "finite",
    correlation,
    classes: [
      { id: "K", name: "Keel", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.2 },
      { id: "H", name: "Hull", attachment: 0.1, detachment: 0.3, running: 0.01 },
    ],
    nthToDefault: [1, 2],
    notes: "",
  };
  const { dealId } = await desk.call("deals.create", { name: "Mole", poolId, marketId, content: deal });
  return { poolId, marketId, dealId, address: `/w/${desk.workspaceId}/deals/${dealId}` };
}
