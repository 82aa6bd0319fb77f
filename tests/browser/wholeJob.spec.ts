import { readFileSync } from "node:fs";
import { join } from "node:path";
import AxeBuilder from "@axe-core/playwright";
import { expect, type Page, test } from "@playwright/test";

const password = "a long enough word";

async function signUp(page: Page, name: string, next = "/"): Promise<void> {
  await page.goto(`/sign-up?next=${encodeURIComponent(next)}`);
  await page.getByLabel("Name").fill(name);
  await page.getByLabel("E-mail").fill(`${name.toLowerCase().replace(/\W/g, "")}${Date.now()}@test.invalid`);
  await page.getByRole("textbox", { name: "Password" }).fill(password);
  await page.getByRole("button", { name: "Make the account" }).click();
}

/** Screenshots for a person to look at: wide and narrow, light and dark. */
async function look(page: Page, name: string): Promise<void> {
  for (const scheme of ["light", "dark"] as const) {
    await page.emulateMedia({ colorScheme: scheme });
    for (const width of [1440, 390]) {
      await page.setViewportSize({ width, height: 900 });
      await page.screenshot({
        path: join("test-results", "screens", `${name}-${scheme}-${width}.png`),
        fullPage: true,
      });
    }
  }
  await page.emulateMedia({ colorScheme: "light" });
  await page.setViewportSize({ width: 1440, height: 900 });
}

test("a structurer imports a pool, sets classes, prices and saves a run; an analyst invited checks it and comments", async ({
  browser,
}) => {
  const structurer = await (await browser.newContext()).newPage();
  await signUp(structurer, "Mara Structurer");
  await structurer.getByLabel("Name of a new workspace").fill("Quay desk");
  await structurer.getByRole("button", { name: "Make the workspace" }).click();
  await expect(structurer.getByRole("heading", { name: "Deals" })).toBeVisible();
  const home = structurer.url().replace(/\/deals.*$/, "");
  const workspaceId = home.split("/").at(-1)!;

  await structurer.goto(`${home}/pools/new`);
  await structurer.locator('input[type="file"]').setInputFiles({
    name: "pool.csv",
    mimeType: "text/csv",
    buffer: readFileSync(join("seed", "pool.csv")),
  });
  await expect(structurer.getByText("125").first()).toBeVisible();
  await look(structurer, "import");
  await structurer.getByLabel(/name of the pool/i).fill("Harbour 125");
  await structurer.getByRole("button", { name: /125/ }).click();
  await expect(structurer.getByRole("heading", { name: "Harbour 125" })).toBeVisible();
  await look(structurer, "pool");

  const market = await structurer.request.post("/api/v1/markets.create", {
    data: {
      workspaceId,
      name: "Flat three",
      pricingDate: "2026-12-01",
      content: { discount: { kind: "flat", rate: 0.03 }, schedule: { kind: "standard", holidays: [] } },
    },
  });
  expect(market.ok()).toBe(true);

  await structurer.goto(`${home}/deals/new`);
  await structurer.getByRole("textbox", { name: "Name" }).fill("Breakwater");
  for (const [i, [name, attachment, detachment, coupon, upfront]] of [
    ["Keel", "0", "3", "500", "40"],
    ["Hull", "3", "7", "500", "5,5"],
  ].entries()) {
    await structurer.getByRole("button", { name: "Add a class" }).click();
    await structurer.getByLabel(`Class of class ${i + 1}`).fill(name!);
    await structurer.getByLabel(`Attachment of class ${i + 1}`).fill(attachment!);
    await structurer.getByLabel(`Detachment of class ${i + 1}`).fill(detachment!);
    await structurer.getByLabel(`Coupon of class ${i + 1}`).fill(coupon!);
    await structurer.getByLabel(`Upfront of class ${i + 1}`).fill(upfront!);
  }
  await structurer.reload();
  await expect(structurer.getByLabel("Upfront of class 2")).toHaveValue("5,5");
  await structurer.getByLabel("Detachment of class 1").fill("4");
  await structurer.getByRole("button", { name: "Store the deal" }).click();
  await expect(structurer.getByText("Class Hull overlaps class Keel")).toBeVisible();
  await structurer.getByLabel("Detachment of class 1").fill("3");
  await structurer.getByRole("button", { name: "Store the deal" }).click();
  await expect(structurer.getByRole("heading", { name: "Breakwater" })).toBeVisible();
  const deal = structurer.url();

  await structurer.getByRole("button", { name: "Price version 1" }).click();
  await expect(structurer.getByRole("heading", { name: "Run 1" })).toBeVisible({ timeout: 60_000 });
  await expect(structurer.getByRole("row", { name: /Keel/ })).toBeVisible();
  await expect(structurer.getByText("Probability of the loss")).toBeVisible();
  await expect(structurer.getByText(/Expected loss \(% of each/)).toBeVisible();
  const run = structurer.url();
  await look(structurer, "run");
  const violations = (await new AxeBuilder({ page: structurer }).analyze()).violations.filter(
    ({ impact }) => impact === "critical",
  );
  expect(violations.map(({ id }) => id)).toEqual([]);

  await structurer.goto(`${home}/people`);
  await structurer.getByRole("button", { name: "Make an invitation link" }).click();
  const link = await structurer.getByTestId("invitation-link").innerText();
  await look(structurer, "people");

  const analyst = await (await browser.newContext()).newPage();
  await signUp(analyst, "Noor Analyst", new URL(link).pathname);
  await analyst.getByRole("button", { name: "Join" }).click();
  await expect(analyst.getByRole("link", { name: "Breakwater" })).toBeVisible();
  await analyst.goto(run);
  await expect(analyst.getByRole("row", { name: /Hull/ })).toBeVisible();
  await structurer.goto(deal);
  await look(structurer, "deal");
  await structurer.getByRole("link", { name: "Talk" }).click();
  await expect(structurer.getByRole("heading", { name: "Talk" })).toBeVisible();
  await analyst.goto(deal);
  await expect(analyst.getByText("You can read this deal, not change it.")).toBeVisible();
  await analyst.getByRole("link", { name: "Talk" }).click();
  await analyst
    .getByLabel("New thread")
    .fill("Is the keel's coupon enough?\nSee https://example.invalid/note");
  await analyst.getByRole("button", { name: "Post" }).click();
  await expect(analyst.getByText("Is the keel's coupon enough?")).toBeVisible();
  await expect(structurer.getByText("Is the keel's coupon enough?")).toBeVisible({ timeout: 5_000 });
  await look(structurer, "talk");
});

test("an unknown address, another workspace and a signed-out visit each lead to a page that says so", async ({
  page,
}) => {
  await page.goto("/nowhere");
  await expect(page.getByRole("heading", { name: "There is nothing here" })).toBeVisible();
  await page.goto("/w/none/deals");
  await expect(page.getByRole("button", { name: "Sign in" })).toBeVisible();
  await signUp(page, "Otto Stranger");
  await expect(page.getByRole("heading", { name: "Workspaces" })).toBeVisible();
  await page.goto("/w/none/deals");
  await expect(page.getByRole("heading", { name: "There is nothing here" })).toBeVisible();
});
