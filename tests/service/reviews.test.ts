import { randomUUID } from "node:crypto";
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest";
import { closeCompute } from "@/lib/compute/serverPool";
import { commands as deals } from "@/lib/deals/commands";
import { execute } from "@/lib/platform/run";
import { commands as pools } from "@/lib/pools/commands";
import { queries as poolQueries } from "@/lib/pools/queries";
import { commands as reviews } from "@/lib/reviews/commands";
import { queries as reviewQueries } from "@/lib/reviews/queries";
import { commands as runs } from "@/lib/runs/commands";
import { withDatabase } from "../support/database";
import { aDealContent, aWorld } from "../support/world";

const place = withDatabase();
type Role = "owner" | "structurer" | "analyst" | "viewer";
let world: Awaited<ReturnType<typeof aWorld>>;
let runId: string;

const as = (role: Role) => ({ database: place.store.database, actor: world.people[role] });
const idOf = (role: Role) => world.people[role].userId;
const problemOf = (work: Promise<unknown>) =>
  work.then(
    () => "none",
    (error) => error.problems?.[0]?.code ?? String(error),
  );

beforeAll(async () => {
  world = await aWorld(place.store.database);
  const { workspaceId, dealId } = world;
  ({ runId } = await execute(runs.price, { workspaceId, dealId, version: 1, note: "" }, as("structurer")));
  const settings = { checklist: ["Pool looked at", "Curve looked at"], needed: 1 };
  await execute(reviews.saveSettings, { workspaceId, settings }, as("owner"));
});

beforeEach(async () => {
  await place.store.database.review.deleteMany({});
});

afterAll(async () => {
  await closeCompute();
});

const asked = async (reviewers: readonly Role[] = ["analyst"]) => {
  const input = {
    workspaceId: world.workspaceId,
    runId,
    reviewers: reviewers.map(idOf),
    note: "Look at the keel",
  };
  const { reviewId } = await execute(reviews.ask, input, as("structurer"));
  return reviewId;
};
const sign = (reviewId: string, role: Role, checks = [true, true]) =>
  execute(reviews.answer, { workspaceId: world.workspaceId, reviewId, answer: "signed", checks }, as(role));
const standing = async () =>
  (
    await execute(
      reviewQueries.standing,
      { workspaceId: world.workspaceId, dealId: world.dealId },
      as("viewer"),
    )
  ).standing;

describe("REVIEW: asking and answering", () => {
  it("signs a run off once every line is checked, by a named person other than who asked", async () => {
    const reviewId = await asked();
    expect(await standing()).toBe("underReview");
    expect(await problemOf(sign(reviewId, "structurer"))).toBe("ownRequest");
    expect(await problemOf(sign(reviewId, "owner"))).toBe("notReviewer");
    expect(await problemOf(sign(reviewId, "viewer"))).toBe("forbidden");
    expect(await problemOf(sign(reviewId, "analyst", [true, false]))).toBe("unchecked");
    expect(await sign(reviewId, "analyst")).toEqual({ state: "signed" });
    expect(await standing()).toBe("signed");
    expect(await problemOf(sign(reviewId, "analyst"))).toBe("closed");
  });

  it("is never asked of oneself, of a viewer, of a stranger, or twice for one run", async () => {
    const input = { workspaceId: world.workspaceId, runId, note: "" };
    const ask = (reviewers: string[]) => execute(reviews.ask, { ...input, reviewers }, as("structurer"));
    expect(await problemOf(ask([idOf("structurer")]))).toBe("ownRequest");
    expect(await problemOf(ask([idOf("viewer")]))).toBe("notReviewer");
    expect(await problemOf(ask([world.stranger.userId]))).toBe("notReviewer");
    await ask([idOf("analyst")]);
    expect(await problemOf(ask([idOf("analyst")]))).toBe("alreadyAsked");
  });

  it("is sent back only with a reason, and can be asked again", async () => {
    const reviewId = await asked();
    const { workspaceId } = world;
    const back = { workspaceId, reviewId, answer: "sentBack" as const, checks: [] };
    expect(await problemOf(execute(reviews.answer, back, as("analyst")))).toBe("noReason");
    await execute(reviews.answer, { ...back, reason: "Recovery of N3?" }, as("analyst"));
    expect(await standing()).toBe("none");
    await asked();
    expect(await standing()).toBe("underReview");
  });

  it("needs as many signatures as the workspace wanted when it was asked", async () => {
    const { workspaceId } = world;
    const wanted = (needed: number) =>
      execute(
        reviews.saveSettings,
        { workspaceId, settings: { checklist: ["Pool looked at", "Curve looked at"], needed } },
        as("owner"),
      );
    await wanted(2);
    expect(await problemOf(asked(["analyst"]))).toBe("tooFew");
    const reviewId = await asked(["analyst", "owner"]);
    await wanted(1);
    expect(await sign(reviewId, "analyst")).toEqual({ state: "open" });
    expect(await problemOf(sign(reviewId, "analyst"))).toBe("notReviewer");
    expect(await sign(reviewId, "owner")).toEqual({ state: "signed" });
  });

  it("is withdrawn by who asked or an owner, by no one else", async () => {
    const reviewId = await asked();
    const { workspaceId } = world;
    expect(await problemOf(execute(reviews.withdraw, { workspaceId, reviewId }, as("analyst")))).toBe(
      "forbidden",
    );
    await execute(reviews.withdraw, { workspaceId, reviewId }, as("owner"));
    expect(await problemOf(sign(reviewId, "analyst"))).toBe("closed");
  });

  it("puts a line into the inbox of those it concerns", async () => {
    await place.store.database.notice.deleteMany({});
    const reviewId = await asked();
    await sign(reviewId, "analyst");
    const notices = await place.store.database.notice.findMany({ orderBy: { id: "asc" } });
    expect(notices.map(({ userId, kind }) => [userId, kind])).toEqual([
      [idOf("analyst"), "review.asked"],
      [idOf("structurer"), "review.answered"],
    ]);
  });
});

describe("REVIEW: a sign-off holds for exactly these numbers", () => {
  it("until the deal, its pool or its market asks for others, and again when the change is undone", async () => {
    await sign(await asked(), "analyst");
    const { workspaceId, dealId, poolId, marketId } = world;
    const save = (version: number, content: typeof aDealContent) =>
      execute(
        deals.save,
        { workspaceId, dealId, version, name: "Deal", poolId, marketId, content },
        as("structurer"),
      );
    await save(1, { ...aDealContent, nthToDefault: [2] });
    expect(await standing()).toBe("changed");
    await save(2, aDealContent);
    expect(await standing()).toBe("signed");
    const pool = await execute(poolQueries.open, { workspaceId, poolId }, as("owner"));
    const { name, currency, names } = pool;
    const changed = names.map((row) => ({ ...row, recovery: 0.3 }));
    await execute(
      pools.save,
      { workspaceId, poolId, version: 1, name, currency, names: changed },
      as("structurer"),
    );
    expect(await standing()).toBe("changed");
  });

  it("can be opened with its request and report, and priced again to the same bits", async () => {
    const reviewId = await asked();
    await sign(reviewId, "analyst");
    const { workspaceId } = world;
    const opened = await execute(reviewQueries.open, { workspaceId, reviewId }, as("viewer"));
    expect(opened.report.requestHash).toBe(opened.requestHash);
    expect(opened.answers).toMatchObject([{ answer: "signed", checks: [true, true] }]);
    expect(await execute(runs.repeat, { workspaceId, runId }, as("analyst"))).toMatchObject({ isSame: true });
  });
});

/** A thousand on a server; the embedded database takes turns on its one connection by itself. */
const RACES = process.env.TEST_DATABASE_URL ? 1_000 : 200;

describe("REVIEW: two reviewers at once make one transition", () => {
  it("in every race of a signature and a sending back, one answer closes the review and the other is refused", async () => {
    const { database } = place.store;
    const { workspaceId, dealId } = world;
    const ids = Array.from({ length: RACES }, () => randomUUID());
    await database.review.createMany({
      data: ids.map((id) => ({
        id,
        workspaceId,
        dealId,
        runId,
        requestHash: "hash",
        reviewers: [idOf("analyst"), idOf("owner")],
        checklist: [],
        needed: 1,
        askedById: idOf("structurer"),
      })),
    });
    for (const reviewId of ids) {
      const back = { workspaceId, reviewId, answer: "sentBack" as const, reason: "No", checks: [] };
      const outcomes = await Promise.all([
        problemOf(sign(reviewId, "analyst", [])),
        problemOf(execute(reviews.answer, back, as("owner"))),
      ]);
      expect([...outcomes].sort()).toEqual(["closed", "none"]);
    }
    const answers = await database.reviewAnswer.findMany({ include: { review: true } });
    expect(answers).toHaveLength(RACES);
    expect(answers.every(({ answer, review }) => review.state === answer)).toBe(true);
  }, 240_000);
});
