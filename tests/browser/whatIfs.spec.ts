import type { Page } from "@playwright/test";
import { type Desk, expect, expectAccessible, test } from "./support/desk";

const sectors = ["Foods", "Ships"];

/** A deal of twelve names in two sectors and two classes; its page's address. */
async function aDeal(desk: Desk): Promise<{ dealId: string; address: string }> {
  const names = Array.from({ length: 12 }, (_, i) => ({
    id: `N${String(i).padStart(2, "0")}`,
    name: `Name ${i}`,
    sector: sectors[i % 2],
    notional: 1_000_000,
    recovery: 0.4,
    credit: { kind: "spread", nodes: [{ years: 5, spread: 0.01 + 0.001 * i }] },
  }));
  const { poolId } = await desk.call("pools.create", { name: "Twelve", currency: "EUR", names });
  const content = { discount: { kind: "flat", rate: 0.02 }, schedule: { kind: "even", perYear: 4 } };
  const { marketId } = await desk.call("markets.create", { name: "M", pricingDate: "2026-12-01", content });
  const { dealId } = await desk.call("deals.create", {
    name: "Mole",
    poolId,
    marketId,
    content: {
      maturity: null,
      years: 5,
      law: "finite",
      correlation: { kind: "flat", rho: 0.3 },
      classes: [
        { id: "k", name: "Keel", attachment: 0, detachment: 0.1, running: 0.05 },
        { id: "d", name: "Deck", attachment: 0.1, detachment: 1, running: 0.002 },
      ],
      nthToDefault: [],
      notes: "",
    },
  });
  return { dealId: String(dealId), address: `/w/${desk.workspaceId}/deals/${dealId}` };
}

async function expectFits(page: Page): Promise<void> {
  await page.setViewportSize({ width: 390, height: 844 });
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  await page.setViewportSize({ width: 1440, height: 900 });
}

test("what drives a class: market inputs, names by size, defaults, sectors; the address holds what is looked at", async ({
  page,
  desk,
}) => {
  const { address } = await aDeal(desk);
  await page.goto(`${address}/drivers`);
  const market = page.getByRole("region", { name: "Market inputs" });
  await expect(market.getByRole("row", { name: /Keel/ })).toBeVisible();
  const names = page.getByRole("region", { name: "Names", exact: true });
  await expect(names.getByRole("row")).toHaveCount(13);
  await expect(names.getByRole("row").nth(12)).not.toContainText("—");
  await page.getByText("Jump to default", { exact: true }).click();
  // The widest name is nearly lost already: its default costs the lowest class least.
  await expect(names.getByRole("row").last()).toContainText("N11");
  await names.getByRole("button", { name: /^Name/ }).click();
  await expect(names.getByRole("row").nth(1)).toContainText("N00");
  await expectAccessible(page);
  await page.getByText("Sectors", { exact: true }).click();
  await page.reload();
  await expect(page.getByRole("heading", { name: "Sector by sector" })).toBeVisible();
  await expect(page.getByRole("row", { name: /Ships 6/ })).toBeVisible();
  await expectFits(page);
});

test("a shock is kept as a scenario; a grid is worked out on the server, survives a reload, and is called off with what it has", async ({
  page,
  desk,
}) => {
  const { address } = await aDeal(desk);
  await page.goto(`${address}/stress`);
  await page.getByLabel("Spreads wider by (%)").first().fill("100");
  await page.getByText("Widest names", { exact: true }).click();
  await page.getByLabel("How many").fill("1");
  await page.getByLabel("Name of the new scenario").fill("Rough water");
  await page.getByRole("button", { name: "Keep as scenario" }).click();
  const scenarios = page.getByRole("region", { name: "Scenarios" });
  await expect(
    scenarios.getByRole("row", { name: /Rough water spreads \+100 %; default of the 1 widest/ }),
  ).toContainText("-");
  await page.getByLabel("Scenario", { exact: true }).selectOption("");

  const grid = page.getByRole("region", { name: "Grid of spreads by correlation" });
  await grid.getByLabel("Spreads wider by (%)").fill("0 100");
  await grid.getByLabel("Correlation up by (points)").fill("0 10");
  await grid.getByRole("button", { name: "Work the grid out" }).click();
  await expect(grid.getByText("Worked out: 5 of 5 cells.")).toBeVisible();
  await grid.getByText("Change", { exact: true }).click();
  await expect(grid.getByRole("row", { name: /^±0/ }).getByRole("cell").nth(1)).toHaveText("0");
  await expectAccessible(page);

  const many = Array.from({ length: 21 }, (_, i) => i).join(" ");
  await grid.getByLabel("Spreads wider by (%)").fill(many);
  await grid.getByLabel("Correlation up by (points)").fill(many);
  await grid.getByRole("button", { name: "Work the grid out" }).click();
  await expect(grid.getByText(/Being worked out on the server: [1-9]/)).toBeVisible();
  await page.reload();
  await expect(grid.getByText(/Being worked out on the server: [1-9]/)).toBeVisible();
  await grid.getByRole("button", { name: "Call it off" }).click();
  await expect(grid.getByText(/Called off: [1-9]\d* of 442 cells/)).toBeVisible();
  await expectFits(page);
});

test("boundaries are placed from targets, said to be impossible where they are, kept beside the deal and laid over it", async ({
  page,
  desk,
}) => {
  const { address } = await aDeal(desk);
  await page.goto(`${address}/sizing`);
  const limit = page.getByLabel("Deck: Expected loss at most (% of class)");
  await limit.fill("0,00000000001");
  await expect(page.getByText(/takes everything|Bound by its limit/)).toBeVisible();
  await limit.fill("0.2");
  await expect(page.getByText("Bound by its limit on expected loss.")).toBeVisible();
  await page.getByRole("button", { name: "Add a class above what is left" }).click();
  await page.getByLabel(/^Class 2: Hit/).fill("0.0001");
  await expect(page.getByText(/Impossible: even the thinnest class below/)).toBeVisible();
  await expect(page.getByRole("button", { name: "Lay over the deal's structure" })).toBeDisabled();
  await page.getByRole("button", { name: "Leave Class 2 out" }).click();
  await expect(page.getByText("Every class is placed.")).toBeVisible();
  await page.getByLabel("Name of the alternative").fill("Deck at 20 bp of loss");
  await page.getByRole("button", { name: "Keep beside the deal" }).click();
  await expect(page.getByRole("heading", { name: "Deck at 20 bp of loss" })).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("button", { name: "Lay over the deal's structure" }).click();
  await expect(page.getByText("Not saved yet", { exact: false }).first()).toBeVisible();
  await page.getByRole("button", { name: "Undo" }).click();
  await expect(page.getByText("Version 1 is saved.")).toBeVisible();
  await expectFits(page);
});

test("a viewer works the grid out in the browser, and is offered nothing that would be kept", async ({
  browser,
  baseURL,
  page,
  desk,
}) => {
  const { address } = await aDeal(desk);
  const { link } = await desk.call("workspaces.invite", { role: "viewer" });
  const viewer = await browser.newContext({ baseURL: baseURL ?? "" });
  const signedUp = await viewer.request.post("/api/accounts/sign-up/email", {
    data: { name: "Vera Reader", email: `vera${Date.now()}@example.test`, password: "a long enough one" },
    headers: { origin: baseURL ?? "" },
  });
  expect(signedUp.ok()).toBe(true);
  const joined = await viewer.request.post("/api/v1/workspaces.join", {
    data: { token: String(link).split("/").at(-1) },
    headers: { origin: baseURL ?? "" },
  });
  expect(joined.ok()).toBe(true);
  const read = await viewer.newPage();
  await read.goto(`${address}/stress`);
  await read.getByRole("button", { name: "Work it out in this browser" }).click();
  const grid = read.getByRole("region", { name: "Grid of spreads by correlation" });
  await expect(grid.getByRole("row", { name: /^\+100/ })).not.toContainText("·");
  await expect(read.getByRole("button", { name: "Keep as scenario" })).toHaveCount(0);
  await read.goto(`${address}/sizing`);
  await expect(read.getByRole("heading", { name: "Structures side by side" })).toBeVisible();
  await expect(read.getByRole("button", { name: "Keep beside the deal" })).toHaveCount(0);
  await viewer.close();
  await page.close();
});
