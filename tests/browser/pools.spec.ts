import { randomUUID } from "node:crypto";
import { readFileSync } from "node:fs";
import type { Page } from "@playwright/test";
import { type Desk, expect, expectAccessible, test } from "./support/desk";

const latin1 = (text: string) => Buffer.from(text, "latin1");
const fileField = (page: Page) => page.locator("input[type=file]");

async function openImport(page: Page, { workspaceId }: Desk): Promise<void> {
  await page.goto(`/w/${workspaceId}/pools`);
  await page.getByRole("link", { name: "Import a pool" }).click();
  await expect(page.getByRole("heading", { name: "Import a pool" })).toBeVisible();
}

async function aStoredPool(desk: Desk): Promise<string> {
  const credit = (spread: number) => ({ kind: "spread", nodes: [{ years: 5, spread }] });
  const names = [
    { id: "A1", name: "Aldermoor", sector: "Foods", notional: 10e6, recovery: 0.4, credit: credit(0.012) },
    { id: "A2", name: "Birchwick", sector: "Retail", notional: 30e6, recovery: 0.35, credit: credit(0.006) },
  ];
  const { poolId } = await desk.call("pools.create", { name: "Harbour pool", currency: "EUR", names });
  return String(poolId);
}

test("the demo file of 125 names becomes a pool, with its sums and its export", async ({ page, desk }) => {
  await openImport(page, desk);
  await fileField(page).setInputFiles("seed/pool.csv");
  await expect(page.getByText("125 rows: 125 fit, 0 do not.")).toBeVisible();
  await expect(page.getByText("29 → 29 bp")).toBeVisible();
  await expectAccessible(page);
  await page.getByRole("button", { name: "Store 125 names" }).click();

  await expect(page.getByRole("heading", { name: "pool", level: 1 })).toBeVisible();
  await expect(page.getByRole("table", { name: "Names" })).toHaveAttribute("aria-rowcount", "126");
  await expect(page.getByText("Mean recovery (%)")).toBeVisible();
  await expectAccessible(page);

  const download = page.waitForEvent("download");
  await page.getByRole("button", { name: "Export CSV" }).click();
  const text = readFileSync((await (await download).path()) ?? "", "utf8");
  expect(text.split("\r\n")[1]).toBe(
    "LL001,Brinewick Ferries,Transport,8000000,0.3,0.0029,0.00485,0.00605,0.0069",
  );
});

test("a file with problems shows each of them by its place, is mended in place and stored whole", async ({
  page,
  desk,
}) => {
  await openImport(page, desk);
  const text = [
    "Bestand per 30.11.2026",
    "",
    "Kennung;Emittent;Branche;Nominal;Erlösquote;CDS 5J (bp)",
    "A1;Ärmelwerk;Energie;1.250.000,50;40 %;85,5",
    'A2;"Brückner; Söhne";Handel;0;140 %;x',
    "Summe;;;9;;",
  ].join("\r\n");
  await fileField(page).setInputFiles({ name: "Bestand.csv", mimeType: "text/csv", buffer: latin1(text) });
  await expect(page.getByText("2 rows: 1 fit, 1 do not. 1 line above the header left out.")).toBeVisible();
  await expect(page.getByText("It says 9, the rows above sum to 1250000.5.")).toBeVisible();

  const download = page.waitForEvent("download");
  await page.getByRole("button", { name: "Save rejected rows as CSV" }).click();
  const rejected = readFileSync((await (await download).path()) ?? "", "utf8");
  expect(rejected).toContain(
    "Nominal must be above 0 and at most 1e15; Erlösquote must be at least 0 % and below 100 %",
  );

  for (const [field, mended] of [
    ["Line 5, Nominal", "750.000"],
    ["Line 5, Erlösquote", "35 %"],
    ["Line 5, CDS 5J (bp)", "120,25"],
  ] as const) {
    await page.getByLabel(field).fill(mended);
    await page.getByLabel(field).press("Enter");
  }
  await page.getByRole("button", { name: "Store 2 names", exact: true }).click();
  await expect(page.getByLabel("Name, A2", { exact: true })).toHaveValue("Brückner; Söhne");
  await expect(page.getByLabel("Spread 5Y (bp), A2", { exact: true })).toHaveValue("120.3");
});

test("pasted cells are read, and a column that was read wrongly is put right", async ({ page, desk }) => {
  await openImport(page, desk);
  await page
    .getByLabel(/Or paste cells/)
    .fill("issuer\tsize\trec\tPD\nAldermoor\t10\t0.4\t0.5\nBirchwick\t20\t0.4\t0.9");
  await page.getByRole("button", { name: "Read what is pasted" }).click();
  await expect(page.getByText("Read as decimals: 0.9 is 90 %.")).toBeVisible();
  await page.getByLabel("PD unit").selectOption("%");
  await page.getByLabel("Name of the pool").fill("Pasted");
  await page.getByRole("button", { name: "Store 2 names" }).click();
  await expect(page.getByLabel("Yearly default probability (%), Birchwick")).toHaveValue("0.9");
});

test("text without a table, and a workbook, are refused in words", async ({ page, desk }) => {
  await openImport(page, desk);
  await page.getByLabel(/Or paste cells/).fill("good morning");
  await page.getByRole("button", { name: "Read what is pasted" }).click();
  await expect(page.getByRole("alert").filter({ hasText: "No header line was found" })).toBeVisible();
  await fileField(page).setInputFiles({
    name: "pool.xlsx",
    mimeType: "application/octet-stream",
    buffer: Buffer.from("PK\u0003\u0004"),
  });
  await expect(page.getByText("pool.xlsx is a workbook: save the sheet as CSV")).toBeVisible();
});

test("names are sorted, found, edited by keyboard and saved; what does not fit is said and kept", async ({
  page,
  desk,
}) => {
  const poolId = await aStoredPool(desk);
  await page.goto(`/w/${desk.workspaceId}/pools/${poolId}`);
  const rows = page.getByRole("table", { name: "Names" }).locator("tbody tr");
  await page.getByRole("button", { name: "Spread 5Y (bp)" }).click();
  await page.getByRole("button", { name: "Spread 5Y (bp)" }).click();
  await expect(rows.first().getByLabel("Id, A2")).toBeVisible();
  await page.getByLabel("Find a name").fill("alder");
  await expect(rows).toHaveCount(1);
  await page.getByLabel("Find a name").fill("");

  const recovery = page.getByLabel("Recovery (%), A1");
  await recovery.fill("140");
  await expect(page.getByText('Recovery (%) "140" must be at least 0 % and below 100 %.')).toBeVisible();
  await expect(page.getByRole("button", { name: "Save" })).toBeDisabled();
  await page.reload();
  await expect(recovery).toHaveValue("140");
  await recovery.fill("37,5");
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByText("Everything is saved.")).toBeVisible();
  await page.reload();
  await expect(recovery).toHaveValue("37.5");
});

test("a save over a newer version shows both and loses nothing typed", async ({ page, desk }) => {
  const poolId = await aStoredPool(desk);
  await page.goto(`/w/${desk.workspaceId}/pools/${poolId}`);
  await page.getByLabel("Recovery (%), A1").fill("20");
  const credit = { kind: "yearly", probability: 0.01 };
  await desk.call("pools.save", {
    poolId,
    version: 1,
    name: "Harbour pool",
    currency: "EUR",
    names: [{ id: "A1", notional: 5e6, recovery: 0.5, credit }],
  });
  await page.getByRole("button", { name: "Save" }).click();
  const both = page.getByRole("table", { name: "Both versions" });
  await expect(both).toContainText("Recovery (%)");
  await expect(both.getByRole("cell", { name: "50", exact: true })).toBeVisible();
  await expect(both.getByRole("cell", { name: "20", exact: true })).toBeVisible();
  await page.getByRole("button", { name: "Keep mine on top of the newer version" }).click();
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByText("Everything is saved.")).toBeVisible();
  const { names } = await desk.call("pools.open", { poolId });
  expect(names).toMatchObject([{ id: "A1", notional: 5e6, recovery: 0.2 }]);
});

test("a block of cells is pasted into the grid, undone, and brought back", async ({
  page,
  desk,
  context,
}) => {
  await context.grantPermissions(["clipboard-read", "clipboard-write"]);
  const poolId = await aStoredPool(desk);
  await page.goto(`/w/${desk.workspaceId}/pools/${poolId}`);
  await page.evaluate(() => navigator.clipboard.writeText("5000000\t25\n6000000\t26"));
  await page.getByLabel("Notional (EUR), A1").focus();
  await page.keyboard.press("Control+V");
  await expect(page.getByLabel("Recovery (%), A2")).toHaveValue("26");
  await page.getByRole("button", { name: "Undo all changes" }).click();
  await expect(page.getByLabel("Recovery (%), A2")).toHaveValue("35");
  await page.getByRole("button", { name: "Bring the changes back" }).click();
  await page.getByRole("button", { name: "Save" }).click();
  await expect(page.getByText("Everything is saved.")).toBeVisible();
  const { names } = await desk.call("pools.open", { poolId });
  expect(names).toMatchObject([
    { id: "A1", notional: 5e6, recovery: 0.25 },
    { id: "A2", notional: 6e6, recovery: 0.26 },
  ]);
});

test("ten thousand rows are read and checked within three seconds", async ({ page, desk }) => {
  const rows = Array.from(
    { length: 10_000 },
    (_, i) => `N${i},Name ${i},Foods,1000000,40,${50 + (i % 300)}.5`,
  );
  const text = ["Id,Name,Sector,Notional,Recovery (%),Spread 5Y (bp)", ...rows].join("\n");
  await openImport(page, desk);
  const start = Date.now();
  await fileField(page).setInputFiles({ name: "large.csv", mimeType: "text/csv", buffer: Buffer.from(text) });
  await expect(page.getByText("10000 rows: 10000 fit, 0 do not.")).toBeVisible();
  expect(Date.now() - start).toBeLessThan(3_000);
  await page.getByRole("button", { name: "Store 10000 names" }).click();
  const grid = page.getByRole("table", { name: "Names" });
  await expect(grid).toHaveAttribute("aria-rowcount", "10001", { timeout: 30_000 });
  expect(await grid.locator("tbody tr").count()).toBeLessThan(100);
});

test("a pool is copied, archived and restored", async ({ page, desk }) => {
  const poolId = await aStoredPool(desk);
  await page.goto(`/w/${desk.workspaceId}/pools/${poolId}`);
  await page.getByRole("button", { name: "Copy" }).click();
  await expect(page.getByRole("heading", { name: "Copy of Harbour pool" })).toBeVisible();
  await page.getByRole("button", { name: "Archive" }).click();
  await expect(page.getByRole("button", { name: "Restore" })).toBeVisible();
  await page.goto(`/w/${desk.workspaceId}/pools`);
  await expect(page.getByRole("link", { name: "Copy of Harbour pool" })).toBeHidden();
  await page.getByLabel("With archived").check();
  await expect(page.getByRole("link", { name: "Copy of Harbour pool" })).toBeVisible();
});

test("a narrow screen keeps the page within its width", async ({ page, desk }) => {
  const poolId = await aStoredPool(desk);
  await page.setViewportSize({ width: 390, height: 844 });
  for (const path of [`pools/${poolId}`, "pools/new", "pools"]) {
    await page.goto(`/w/${desk.workspaceId}/${path}`);
    await expect(page.getByRole("heading", { level: 1 })).toBeVisible();
    expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  }
});

test("someone who may only read sees the names and no way to change them", async ({
  desk,
  browser,
  baseURL,
}) => {
  const poolId = await aStoredPool(desk);
  const invited = await desk.call("workspaces.invite", { role: "viewer", email: "" });
  const token = String(invited.link).split("/").pop();
  const context = await browser.newContext({ ...(baseURL ? { baseURL } : {}) });
  const headers = { origin: baseURL ?? "" };
  const data = { name: "Vera Quill", email: `${randomUUID()}@example.test`, password: "a long enough one" };
  await context.request.post("/api/accounts/sign-up/email", { data, headers });
  const accepted = await context.request.post("/api/v1/workspaces.join", { data: { token }, headers });
  expect(accepted.ok(), await accepted.text()).toBe(true);
  const reader = await context.newPage();
  await reader.goto(`/w/${desk.workspaceId}/pools/${poolId}`);
  await expect(reader.getByRole("cell", { name: "Aldermoor" })).toBeVisible();
  await expect(reader.getByRole("button", { name: "Save" })).toBeHidden();
  await expect(reader.getByRole("button", { name: "Archive" })).toBeHidden();
  await expect(reader.getByRole("table", { name: "Names" }).getByRole("textbox")).toHaveCount(0);
  await expectAccessible(reader);
  await context.close();
});
