import { randomUUID } from "node:crypto";
import type { Browser, BrowserContext } from "@playwright/test";
import { aMarket, aPool } from "../support/builders";
import { type Desk, expect, expectAccessible, test } from "./support/desk";

const content = {
  maturity: "2031-12-20",
  years: null,
  law: "finite",
  correlation: { kind: "flat", rho: 0.3 },
  classes: [
    { id: "E", name: "Keel", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.2 },
    { id: "M", name: "Hull", attachment: 0.1, detachment: 0.3, running: 0.01 },
  ],
  nthToDefault: [],
  notes: "",
};

/** A deal with one run, and a second person, an analyst, signed in elsewhere. */
async function aDealForTwo(desk: Desk, browser: Browser, baseURL: string) {
  const pool = await desk.call("pools.create", { ...aPool(10) });
  const market = await desk.call("markets.create", { ...aMarket() });
  const parts = { name: "Breakwater", poolId: pool.poolId, marketId: market.marketId };
  const { dealId } = await desk.call("deals.create", { ...parts, content });
  const { runId } = await desk.call("runs.price", { dealId, version: 1, note: "" });
  const { link } = await desk.call("workspaces.invite", { role: "analyst" });
  const other = await browser.newContext({ baseURL });
  await signUp(other, baseURL, "Noor Haldane");
  const headers = { origin: baseURL };
  const data = { token: String(link).split("/").at(-1) };
  expect((await other.request.post("/api/v1/workspaces.join", { data, headers })).ok()).toBe(true);
  return { parts, home: `/w/${desk.workspaceId}`, dealId: String(dealId), runId: String(runId), other };
}

async function signUp(context: BrowserContext, origin: string, name: string): Promise<void> {
  const data = { name, email: `${randomUUID()}@example.test`, password: "a long enough one" };
  const answer = await context.request.post("/api/accounts/sign-up/email", { data, headers: { origin } });
  expect(answer.ok()).toBe(true);
}

test("two people talk about a figure: seen live, named and told, then and now after a new run", async ({
  desk,
  page: owner,
  browser,
  baseURL,
}) => {
  const { parts, home, dealId, runId, other } = await aDealForTwo(desk, browser, baseURL ?? "");
  const deal = `${home}/deals/${dealId}`;
  const analyst = await other.newPage();
  await owner.goto(`${deal}/talk`);
  await expect(owner.getByText("Nobody has said anything yet.")).toBeVisible();

  await analyst.goto(`${deal}/runs/${runId}`);
  await expect(owner.getByText("Also looking: Noor Haldane")).toBeVisible();
  await analyst.getByRole("button", { name: "Point at a figure" }).click();
  await analyst.getByRole("button", { name: "Talk about Expected loss of Keel" }).click();
  const field = analyst.getByRole("textbox", { name: "What about Expected loss of Keel" });
  await field.fill("**High**, is it not? @Ad");
  await field.press("End");
  await expect(analyst.getByRole("option", { name: "Ada Fennimore" })).toBeVisible();
  await field.press("Enter");
  await expect(field).toHaveValue("**High**, is it not? @Ada Fennimore ");
  await analyst.reload();
  await analyst.getByRole("button", { name: "Point at a figure" }).click();
  await analyst.getByRole("button", { name: "Talk about Expected loss of Keel" }).click();
  await expect(field).toHaveValue("**High**, is it not? @Ada Fennimore ");
  await field.press("Control+Enter");

  await expect(owner.getByText("High", { exact: true })).toBeVisible();
  await expect(owner.getByRole("link", { name: "Inbox (1)" })).toBeVisible();
  await expect(analyst.getByRole("link", { name: "1 open thread on Expected loss of Keel" })).toBeVisible();
  await owner.getByRole("link", { name: "Inbox (1)" }).click();
  await expectAccessible(owner);
  await owner.getByRole("link", { name: "Noor Haldane named you in Breakwater" }).click();
  const comment = owner.locator("[data-linked]");
  await expect(comment).toContainText("High, is it not? @Ada Fennimore");
  await expect(comment).toBeInViewport();
  await expect(owner.getByText("(the latest run is still that one)")).toBeVisible();
  await expectAccessible(owner);

  const classes = [{ ...content.classes[0], detachment: 0.05 }, content.classes[1]];
  await desk.call("deals.save", { ...parts, dealId, version: 1, content: { ...content, classes } });
  await desk.call("runs.price", { dealId, version: 2, note: "" });
  await expect(owner.getByText(/then, run 1, .+ now, run 2, .+ change/)).toBeVisible();

  await owner.getByRole("textbox", { name: "Reply" }).fill("Lower now.");
  await owner.getByRole("button", { name: "Reply" }).click();
  await analyst.getByRole("link", { name: "1 open thread on Expected loss of Keel" }).click();
  await expect(analyst.getByText("Lower now.")).toBeVisible();
  await analyst.getByRole("button", { name: "Resolve" }).click();
  await expect(analyst.getByText("No thread is like that.")).toBeVisible();
  await owner.getByText("Resolved", { exact: true }).first().click();
  await expect(owner.getByText("Lower now.")).toBeVisible();

  await analyst.goto(deal);
  await analyst.getByRole("button", { name: "Talk about Hull" }).click();
  await analyst.getByRole("textbox", { name: "What about Hull" }).fill("Why so thick?");
  await analyst.getByRole("button", { name: "Post" }).click();
  await expect(analyst.getByRole("link", { name: "1 open thread on Hull" })).toBeVisible();
  await other.close();
  await expect(owner.getByText("Also looking")).toBeHidden();
});
