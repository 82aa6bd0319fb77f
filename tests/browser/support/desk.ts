import { randomUUID } from "node:crypto";
import AxeBuilder from "@axe-core/playwright";
import { test as base, expect, type Page } from "@playwright/test";

/** A signed-in person with a workspace of their own, and a way to run operations as them without a screen. */
export interface Desk {
  readonly workspaceId: string;
  /** Runs an operation; fails the test when it is refused. */
  call(operation: string, input: Record<string, unknown>): Promise<Record<string, unknown>>;
}

export const test = base.extend<{ desk: Desk }>({
  desk: async ({ context, baseURL }, use) => {
    const headers = { origin: baseURL ?? "" };
    const data = {
      name: "Ada Fennimore",
      email: `${randomUUID()}@example.test`,
      password: "a long enough one",
    };
    const signedUp = await context.request.post("/api/accounts/sign-up/email", { data, headers });
    expect(signedUp.ok()).toBe(true);
    const run = async (operation: string, input: Record<string, unknown>) => {
      const response = await context.request.post(`/api/v1/${operation}`, { data: input, headers });
      expect(response.ok(), await response.text()).toBe(true);
      return response.json();
    };
    const { workspaceId } = await run("workspaces.create", { name: "Quay" });
    await use({ workspaceId, call: (operation, input) => run(operation, { workspaceId, ...input }) });
  },
});

/** No breach of WCAG 2.1 A and AA that axe can find. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(["wcag2a", "wcag2aa", "wcag21a", "wcag21aa"])
    .analyze();
  expect(violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(" | ")}`)).toEqual(
    [],
  );
}

export { expect };
