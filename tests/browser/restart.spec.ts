import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { type BrowserContext, expect, test } from "@playwright/test";
import { startPostgres } from "../runner/postgres";
import { freePort, startApp } from "./support/appProcess";

const aNames = [
  { id: "A", notional: 1, recovery: 0.4, credit: { kind: "hazard", rate: 0.02 } },
  { id: "B", notional: 1, recovery: 0.4, credit: { kind: "hazard", rate: 0.03 } },
];

/** Operations as a person, by the app's own door. */
function doorOf(context: BrowserContext, address: string) {
  return async (path: string, data: Record<string, unknown>) => {
    const response = await context.request.post(`${address}/api/${path}`, {
      data,
      headers: { origin: address },
    });
    expect(response.ok(), await response.text()).toBe(true);
    return response.json();
  };
}

for (const mode of ["embedded", "server"] as const) {
  test(`a running app killed with -9 (${mode}) loses no acknowledged write, and the page in mid-edit says so, keeps what is typed and saves it after the restart`, async ({
    browser,
  }) => {
    const postgres = mode === "server" ? await startPostgres() : null;
    test.skip(mode === "server" && postgres === null, "no PostgreSQL server to be had");
    const DATA_DIR = mkdtempSync(join(tmpdir(), "loadline-restart-"));
    const settings = { PORT: await freePort(), DATA_DIR, DATABASE_URL: postgres?.url ?? "" };
    let app = await startApp(settings);
    const context = await browser.newContext({ baseURL: app.address });
    const post = doorOf(context, app.address);
    const email = `restart${Date.now()}@test.invalid`;
    await post("accounts/sign-up/email", { name: "Ada Fennimore", email, password: "a long enough word" });
    const { workspaceId } = await post("v1/workspaces.create", { name: "Quay" });
    const { poolId } = await post("v1/pools.create", {
      workspaceId,
      name: "P",
      currency: "EUR",
      names: aNames,
    });
    const content = { discount: { kind: "flat", rate: 0.03 }, schedule: { kind: "standard", holidays: [] } };
    const market = { workspaceId, name: "M", pricingDate: "2026-12-01", content };
    const { marketId } = await post("v1/markets.create", market);
    const deal = {
      maturity: "2031-12-20",
      years: null,
      law: "finite",
      correlation: { kind: "flat", rho: 0.3 },
      classes: [{ id: "k", name: "Keel", attachment: 0, detachment: 0.3 }],
      nthToDefault: [],
      notes: "",
    };
    const { dealId } = await post("v1/deals.create", {
      workspaceId,
      name: "Mole",
      poolId,
      marketId,
      content: deal,
    });
    const page = await context.newPage();
    await page.goto(`/w/${workspaceId}/deals/${dealId}`);
    await page.getByLabel("Class of class 1").fill("Keel plate");

    let acknowledged = 0;
    const writing = (async () => {
      for (let i = 1; i <= 1_000; i++) {
        const input = { workspaceId, dealId, body: `remark ${i}` };
        const options = { data: input, headers: { origin: app.address }, timeout: 5_000 };
        const answer = await context.request
          .post(`${app.address}/api/v1/discussion.start`, options)
          .catch(() => null);
        if (!answer?.ok()) return;
        acknowledged = i;
      }
    })();
    await expect.poll(() => acknowledged, { timeout: 60_000 }).toBeGreaterThan(15);
    await app.kill("SIGKILL");
    await writing;
    await expect(page.getByText("The connection to the server is lost")).toBeVisible();
    await expect(page.getByLabel("Class of class 1")).toHaveValue("Keel plate");

    app = await startApp(settings);
    await expect(page.getByText("The connection to the server is lost")).toBeHidden();
    const { threads } = await post("v1/discussion.list", { workspaceId, dealId });
    const kept = new Set(JSON.stringify(threads).match(/remark \d+/g));
    for (let i = 1; i <= acknowledged; i++) expect(kept.has(`remark ${i}`), `remark ${i}`).toBe(true);
    await expect(page.getByLabel("Class of class 1")).toHaveValue("Keel plate");
    await page.getByRole("button", { name: "Save", exact: true }).click();
    await expect(page.getByText("Version 2 is saved")).toBeVisible();
    await context.close();
    await app.kill("SIGTERM");
    await postgres?.stop();
    rmSync(DATA_DIR, { recursive: true, force: true });
  });
}

test("a session that has ended asks for the password in place, and what is typed is still there to be saved", async ({
  page,
  context,
  baseURL,
}) => {
  const post = doorOf(context, baseURL!);
  const email = `ended${Date.now()}@test.invalid`;
  const password = "a long enough word";
  await post("accounts/sign-up/email", { name: "Ada Fennimore", email, password });
  const { workspaceId } = await post("v1/workspaces.create", { name: "Quay" });
  await page.goto(`/w/${workspaceId}/markets/new`);
  await page.getByLabel("Name").fill("Typed before");
  await page.getByLabel(/Zero rate/).fill("3");
  await context.clearCookies();
  await page
    .getByRole("button", { name: /^(Store|Save)/ })
    .first()
    .click();
  await expect(page.getByText("You are signed out")).toBeVisible();
  await page.getByLabel("E-mail").fill(email);
  await page.getByRole("textbox", { name: "Password" }).fill(password);
  await page.getByRole("button", { name: "Sign in" }).click();
  await expect(page.getByText("You are signed out")).toBeHidden();
  await expect(page.getByLabel("Name")).toHaveValue("Typed before");
  await page
    .getByRole("button", { name: /^(Store|Save)/ })
    .first()
    .click();
  await expect(page.getByRole("heading", { name: "Typed before" })).toBeVisible();
});
