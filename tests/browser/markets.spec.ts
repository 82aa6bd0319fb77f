import { expect, expectAccessible, test } from "./support/desk";

const content = {
  discount: { kind: "flat", rate: 0.02 },
  schedule: { kind: "standard", holidays: [] },
};

test("a market is given by par rates, checked beside its fields, and stored", async ({ page, desk }) => {
  await page.goto(`/w/${desk.workspaceId}/markets`);
  await page.getByRole("link", { name: "New market" }).click();
  await page.getByLabel("Name", { exact: true }).fill("Year end");
  await page.getByLabel("Pricing date").fill("2026-11-30");
  await page.getByLabel("Given as").selectOption("par swap rates (annual, whole years)");
  await page.getByLabel("Par swap rate (%) of node 1").fill("5");
  await page.getByRole("button", { name: "Add a node" }).click();
  await page.getByLabel("Par swap rate (%) of node 2").fill("five");
  await expect(page.getByText('"five" is not a number.')).toBeVisible();
  await expect(page.getByRole("button", { name: "Store the market" })).toBeDisabled();
  await page.reload();
  await expect(page.getByLabel("Par swap rate (%) of node 2")).toHaveValue("five");
  await page.getByLabel("Par swap rate (%) of node 2").fill("5,0");

  const factors = page.getByRole("table", { name: "Discount factors" });
  await expect(factors.getByTitle(/^0\.95238095238/)).toHaveText("0.9524");
  await expect(page.getByRole("table", { name: "Payments" })).toContainText("2026-12-21");
  await page.getByLabel("Holidays").fill("2026-12-21");
  await expect(page.getByRole("table", { name: "Payments" })).toContainText("2026-12-22");
  await expectAccessible(page);
  await page.getByRole("button", { name: "Store the market" }).click();
  await expect(page.getByRole("heading", { name: "Year end", level: 1 })).toBeVisible();
  await page.goto(`/w/${desk.workspaceId}/markets`);
  await expect(page.getByRole("row", { name: /Year end/ })).toContainText("par swap rates");
});

test("a save over a newer version shows both and loses nothing typed", async ({ page, desk }) => {
  const market = { name: "Quarter end", pricingDate: "2026-11-30", content };
  const { marketId } = await desk.call("markets.create", market);
  await page.goto(`/w/${desk.workspaceId}/markets/${marketId}`);
  const rate = page.getByLabel("Zero rate, continuously compounded (%)");
  await rate.fill("2.5");
  const discount = { kind: "flat", rate: 0.03 };
  await desk.call("markets.save", { marketId, version: 1, ...market, content: { ...content, discount } });
  await page.getByRole("button", { name: "Save" }).click();
  const both = page.getByRole("table", { name: "Both versions" });
  await expect(both.getByRole("row", { name: "Flat rate (%) 3 2.5" })).toBeVisible();
  await page.getByRole("button", { name: "Keep mine on top of the newer version" }).click();
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByText("Everything is saved.")).toBeVisible();
  await expect(rate).toHaveValue("2.5");
});

test("a market is copied, archived and restored, and fits a narrow screen", async ({ page, desk }) => {
  await page.setViewportSize({ width: 390, height: 844 });
  const { marketId } = await desk.call("markets.create", {
    name: "Month end",
    pricingDate: "2026-11-30",
    content,
  });
  await page.goto(`/w/${desk.workspaceId}/markets/${marketId}`);
  await page.getByRole("button", { name: "Copy" }).click();
  await expect(page.getByRole("heading", { name: "Copy of Month end" })).toBeVisible();
  await page.getByRole("button", { name: "Archive" }).click();
  await expect(page.getByRole("button", { name: "Restore" })).toBeVisible();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
});
