import { expect, expectAccessible, test } from "./support/desk";
import { aStoredDeal } from "./support/person";

test("a boundary is dragged and moved by keys, figures follow, a change is undone, and a class is cut and joined", async ({
  page,
  desk,
}) => {
  const { address } = await aStoredDeal(desk);
  await page.goto(address);
  await expect(page.getByText(/priced in this browser/)).toBeVisible();
  const row = page.getByRole("row").filter({ has: page.getByLabel("Class of class 1") });
  const before = await row.innerText();
  const grip = page.getByRole("slider", { name: "Boundary between Keel and Hull" });
  const box = (await grip.boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
  await page.mouse.down();
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2 - 60, { steps: 12 });
  await page.mouse.up();
  const dragged = Number(await page.getByLabel("Detachment of class 1").inputValue());
  expect(dragged).toBeGreaterThan(11);
  await expect(page.getByLabel("Attachment of class 2")).toHaveValue(String(dragged));
  await expect.poll(() => row.innerText()).not.toBe(before);
  await page.getByRole("button", { name: "Undo" }).click();
  await expect(page.getByLabel("Detachment of class 1")).toHaveValue("10");
  await grip.focus();
  await page.keyboard.press("Shift+ArrowUp");
  await page.keyboard.press("ArrowUp");
  await expect(page.getByLabel("Detachment of class 1")).toHaveValue("11.1");
  await page.getByRole("button", { name: "Drop all changes" }).click();

  await page.getByRole("button", { name: "Change Hull" }).click();
  await page.getByRole("menuitem", { name: "Cut in two halves" }).click();
  await expect(page.getByLabel("Attachment of class 3")).toHaveValue("20");
  await page.getByRole("button", { name: "Change Hull", exact: true }).click();
  await page.getByRole("menuitem", { name: /Join with/ }).click();
  await expect(page.getByLabel("Attachment of class 3")).toHaveCount(0);
  await expectAccessible(page);
});

test("names are edited like a spreadsheet; a default and a substitution show each class's move before anything is saved", async ({
  page,
  desk,
}) => {
  const { address, poolId } = await aStoredDeal(desk);
  await page.goto(`${address}/pool`);
  const cell = (label: string) => page.getByLabel(label, { exact: true });
  await cell("Recovery (%), N1").focus();
  await page.keyboard.type("25");
  await page.keyboard.press("Enter");
  await expect(cell("Recovery (%), N2")).toBeFocused();
  await page.keyboard.press("ArrowUp");
  await page.keyboard.press("Shift+ArrowDown");
  await page.keyboard.press("Shift+ArrowDown");
  await page.keyboard.press("Control+d");
  await expect(cell("Recovery (%), N3")).toHaveValue("25");
  await expect(page.getByText("Expected loss, tried")).toBeVisible();
  await page.keyboard.press("Control+z");
  await expect(cell("Recovery (%), N3")).toHaveValue("40");
  await page.keyboard.press("Home");
  await expect(cell("Id, N3")).toBeFocused();
  await page.getByRole("button", { name: "Drop what is tried" }).click();

  await page.getByRole("combobox", { name: "One name" }).fill("N12");
  await page.getByRole("option", { name: /N12/ }).click();
  await page.getByRole("button", { name: "Let it default" }).click();
  const keel = page.getByRole("row", { name: /^Keel/ });
  await expect(keel.getByRole("cell").nth(3)).not.toHaveText("—", { timeout: 30_000 });
  const { names } = (await desk.call("pools.open", { poolId })) as { names: { credit: { kind: string } }[] };
  expect(names.every(({ credit }) => credit.kind === "spread")).toBe(true);
});

test("the order of defaults has contracts and pairs; a pair is walked to by keys and stands in figures", async ({
  page,
  desk,
}) => {
  const { address } = await aStoredDeal(desk);
  await page.goto(`${address}/order`);
  await expect(page.getByRole("table").getByRole("row")).toHaveCount(3, { timeout: 30_000 });
  const matrix = page.getByRole("application", { name: /Matrix of pairs/ });
  await matrix.focus();
  await page.keyboard.press("ArrowRight");
  await expect(matrix).toHaveAccessibleName(/Now N1, Name 1 and N[0-9]+/);
  await expect(page.getByText(/joint default probability/)).toBeVisible();
  await expectAccessible(page);
});

test("two runs are laid side by side, with what moved the value summing to the whole change", async ({
  page,
  desk,
}) => {
  const { address, dealId, poolId, marketId } = await aStoredDeal(desk);
  await desk.call("runs.price", { dealId, version: 1, note: "first" });
  const { content } = (await desk.call("deals.open", { dealId })) as { content: Record<string, unknown> };
  const changed = { ...content, correlation: { kind: "flat", rho: 0.5 } };
  await desk.call("deals.save", { dealId, version: 1, name: "Mole", poolId, marketId, content: changed });
  await desk.call("runs.price", { dealId, version: 2, note: "second" });
  await page.goto(`${address}/runs`);
  await page.getByRole("button", { name: "Lay the two chosen side by side" }).click();
  await expect(page.getByRole("cell", { name: "Correlation and loss law" })).toBeVisible({ timeout: 60_000 });
  await expect(page.getByRole("heading", { name: "Inputs that differ (1)" })).toBeVisible();
  await page.getByRole("link", { name: "History" }).click();
  await page.getByRole("button", { name: "Take it again" }).click();
  await expect(page.getByText("Version 3 is saved")).toBeVisible();
});
