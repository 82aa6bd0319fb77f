import { expect, test } from "./support/desk";
import { aColleague, aStoredDeal } from "./support/person";

test("two people change different parts of one deal and both changes are saved; the same field is chosen, nothing typed is lost", async ({
  page,
  desk,
  browser,
  baseURL,
}) => {
  const { address, dealId } = await aStoredDeal(desk);
  const other = await aColleague(browser, desk, baseURL, "Bela Marlow", "structurer");
  await page.goto(address);
  await other.goto(address);
  await page.getByLabel("Coupon of class 1").fill("600");
  await other.getByLabel("Detachment of class 2").fill("35");
  await other.getByRole("button", { name: "Save", exact: true }).click();
  await expect(other.getByText("Version 2 is saved")).toBeVisible();
  await expect(page.getByText("do not touch each other")).toBeVisible();
  await page.reload();
  await expect(page.getByLabel("Coupon of class 1")).toHaveValue("600");
  await page.getByRole("button", { name: "Go on with both on version 2" }).click();
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Version 3 is saved")).toBeVisible();
  const { content } = (await desk.call("deals.open", { dealId })) as { content: { classes: unknown[] } };
  expect(content.classes).toMatchObject([{ running: 0.06 }, { detachment: 0.35 }]);

  await expect(other.getByText("Version 3 is saved")).toBeVisible();
  await page.getByLabel("Upfront of class 1").fill("25");
  await other.getByLabel("Upfront of class 1").fill("30");
  await other.getByRole("button", { name: "Save", exact: true }).click();
  const both = page.getByRole("table", { name: "Both versions" });
  await expect(both.getByRole("row", { name: /Class Keel, upfront/ })).toContainText("30");
  await both.getByRole("radio", { name: "30" }).check();
  await page.getByRole("button", { name: "Go on with both on version 4" }).click();
  await expect(page.getByLabel("Upfront of class 1")).toHaveValue("30");
});

test("a review is asked, given by another person, seen at once, and undone by a change; never of one's own", async ({
  page,
  desk,
  browser,
  baseURL,
}) => {
  const { address, dealId } = await aStoredDeal(desk);
  await desk.call("runs.price", { dealId, version: 1, note: "" });
  const analyst = await aColleague(browser, desk, baseURL, "Noor Analyst", "analyst");
  await page.goto(`${address}/sign-off`);
  await page.getByRole("combobox", { name: /Reviewers/ }).click();
  await expect(page.getByRole("option", { name: /Ada/ })).toHaveCount(0);
  await page.getByRole("option", { name: /Noor Analyst/ }).click();
  await page.keyboard.press("Escape");
  await page.getByLabel("What to check").fill("The keel's coupon");
  await page.getByRole("button", { name: "Ask for the review" }).click();
  await expect(page.getByRole("article", { name: "Review of run 1" })).toBeVisible();
  await expect(page.getByRole("button", { name: /Sign off run/ })).toHaveCount(0);

  await analyst.goto(`${address}/sign-off`);
  await expect(analyst.getByRole("link", { name: "Inbox (1)" })).toBeVisible();
  const sign = analyst.getByRole("button", { name: "Sign off run 1" });
  await expect(sign).toBeDisabled();
  for (const line of await analyst.getByRole("checkbox").all()) await line.check();
  await sign.click();
  await expect(page.getByText("Signed off", { exact: true }).first()).toBeVisible();
  await analyst.getByRole("button", { name: "Price again, compare bits" }).click();
  await expect(analyst.getByText("Priced again: the same to the bit")).toBeVisible();

  await page.goto(address);
  await page.getByLabel("Coupon of class 1").fill("650");
  await page.getByRole("button", { name: "Save", exact: true }).click();
  await expect(page.getByText("Changed since sign-off")).toBeVisible();
  await expect(analyst.getByText("Changed since sign-off")).toBeVisible();
});
