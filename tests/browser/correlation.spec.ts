import type { Page } from "@playwright/test";
import { type Desk, expect, expectAccessible, test } from "./support/desk";

const sectors = ["Foods", "Ships"];

async function aPool(desk: Desk, name: string, spread: number): Promise<unknown> {
  const names = Array.from({ length: 10 }, (_, i) => ({
    id: `N${String(i).padStart(2, "0")}`,
    name: `Name ${i}`,
    sector: sectors[i % 2],
    notional: 1_000_000,
    recovery: 0.4,
    credit: { kind: "spread", nodes: [{ years: 5, spread }] },
  }));
  return (await desk.call("pools.create", { name, currency: "EUR", names })).poolId;
}

async function aDeal(desk: Desk, marketId: unknown, poolId: unknown): Promise<string> {
  const { dealId } = await desk.call("deals.create", {
    name: "Jetty",
    poolId,
    marketId,
    content: {
      maturity: null,
      years: 5,
      law: "finite",
      correlation: { kind: "flat", rho: 0.3 },
      classes: [
        { id: "k", name: "Keel", attachment: 0, detachment: 0.1, running: 0.05, upfront: 0.2 },
        { id: "d", name: "Deck", attachment: 0.1, detachment: 1, running: 0.002 },
      ],
      nthToDefault: [1],
      notes: "",
    },
  });
  return `/w/${desk.workspaceId}/deals/${dealId}`;
}

async function paste(page: Page, label: string, text: string): Promise<void> {
  await page.getByLabel(label).evaluate((input, pasted) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData("text/plain", pasted);
    input.dispatchEvent(new ClipboardEvent("paste", { clipboardData, bubbles: true, cancelable: true }));
  }, text);
}

async function expectFits(page: Page): Promise<void> {
  await page.setViewportSize({ width: 390, height: 844 });
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  await page.setViewportSize({ width: 1440, height: 900 });
}

test("quotes pasted into a market's grid become the base curve that a deal of another pool is read from", async ({
  page,
  desk,
}) => {
  const content = { discount: { kind: "flat", rate: 0.02 }, schedule: { kind: "even", perYear: 4 } };
  const { marketId } = await desk.call("markets.create", { name: "M", pricingDate: "2026-12-01", content });
  await aPool(desk, "Quoted ten", 0.01);
  const address = await aDeal(desk, marketId, await aPool(desk, "Deal's ten", 0.015));

  await page.goto(`/w/${desk.workspaceId}/markets/${marketId}`);
  await page.getByRole("button", { name: "Add a quoted pool" }).click();
  await page.getByLabel("Name of the quotes").fill("Ten quoted");
  await page.getByLabel("Pool quoted").selectOption({ label: "Quoted ten" });
  await paste(page, "Maturity of quote 1", "5\t0\t10\t500\t7,5\n5\t10\t30\t100\tsoon\n");
  await expect(page.getByText('Line 2: "soon" is not a number.')).toBeVisible();
  await expect(page.getByLabel("Upfront (%) of quote 2")).toHaveAttribute("aria-invalid", "true");
  await expect(page.getByRole("button", { name: "Save", exact: true })).toBeDisabled();
  await page.getByLabel("Upfront (%) of quote 2").fill("1.5");
  await page.getByLabel("Detachment (%) of quote 2").fill("9");
  await page.getByRole("button", { name: "Save", exact: true }).click();
  // What only the pricing request refuses stands at its quote too.
  await expect(page.getByLabel("What does not fit in the quotes of Ten quoted")).toContainText("Line 2:");
  await page.getByLabel("Detachment (%) of quote 2").fill("30");
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Everything is saved.")).toBeVisible();
  await expectAccessible(page);

  await page.goto(`${address}/correlation`);
  await expect(page.getByRole("heading", { name: /Implied correlation/ })).toBeVisible();
  await page.getByLabel("How names default together").selectOption("market");
  await expect(page.getByLabel("Quoted pool of the market")).toHaveValue(/.+/);
  await page.getByLabel("From quoted pool to deal's pool").selectOption("moneyness");
  await expect(page.getByRole("figure", { name: /Base correlation curve/ })).toBeVisible();
  const tableWith = (text: string) => page.getByRole("table").filter({ hasText: text });
  const curve = tableWith("Quoted from");
  await expect(curve.getByRole("row", { name: /^10 / })).toBeVisible();
  // The deal's pool loses more: its 10 % is a lower strike of the quoted pool, as the expected losses are to each other.
  const mapped = tableWith("Strike of the quoted pool");
  await expect(mapped.getByRole("row").nth(1)).toContainText(/^10/);
  const implied = tableWith("Implied correlation");
  await expect(implied.getByRole("row", { name: /Keel/ })).toContainText(/solution|No flat correlation/);
  await expectAccessible(page);
  await expectFits(page);
});

test("contracts are typed and priced; a pair is found by name or keys, asset and event correlation told apart", async ({
  page,
  desk,
}) => {
  const content = { discount: { kind: "flat", rate: 0.02 }, schedule: { kind: "even", perYear: 4 } };
  const { marketId } = await desk.call("markets.create", { name: "M", pricingDate: "2026-12-01", content });
  const address = await aDeal(desk, marketId, await aPool(desk, "Ten", 0.02));
  await page.goto(`${address}/order`);
  await page.getByLabel("Contracts priced: n, parted by commas").fill("1, 2, 11");
  await expect(page.getByText(/11/).first()).toBeVisible();
  await page.getByLabel("Contracts priced: n, parted by commas").fill("1, 2, 3");
  const contracts = page.getByRole("table").filter({ hasText: "At least n defaults" });
  await expect(contracts.getByRole("row")).toHaveCount(4);
  const matrix = page.getByRole("application", { name: /Matrix of pairs/ });
  // Sorted by sector: the even names are the foods, so one to the right of N01's column of ships stands N03.
  await matrix.focus();
  await expect(matrix).toHaveAccessibleName(/N00, Name 0 and N01, Name 1/);
  await page.keyboard.press("ArrowRight");
  await expect(matrix).toHaveAccessibleName(/N00, Name 0 and N03, Name 3/);
  await expect(page.getByText(/asset correlation 30 %, joint default probability/)).toBeVisible();
  await expectAccessible(page);
  await expectFits(page);
});
