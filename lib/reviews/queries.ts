import { currentHash } from "../deals/current";
import { dealIn } from "../deals/find";
import { dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { notFound } from "../platform/errors";
import { defineQuery } from "../platform/operation";
import { unpackedReport, unpackedRequest } from "../runs/stored";
import { mayManage, mayWork } from "../workspaces/policy";
import { inWorkspace } from "../workspaces/schema";
import { subjectOf } from "./commands";
import { mayAnswer, mayAsk, mayWithdraw } from "./policy";
import { reviewInput, settingsOf } from "./schema";
import type { Standing } from "./standing";

/** Whether the deal as it is now, its pool and market included, is what was signed off. */
const standing = defineQuery({
  name: "reviews.standing",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const reviews = await context.tx.review.findMany({
      where: { dealId, state: { in: ["open", "signed"] } },
      select: { state: true, requestHash: true },
    });
    const signed = reviews.filter(({ state }) => state === "signed");
    if (reviews.length === 0) return { standing: "none" as Standing };
    const hash = signed.length > 0 ? await currentHash(context, workspaceId, dealId) : null;
    const now: Standing = signed.some(({ requestHash }) => requestHash === hash)
      ? "signed"
      : reviews.some(({ state }) => state === "open")
        ? "underReview"
        : "changed";
    return { standing: now };
  },
});

/** Every review of a deal, newest first, with what this member may do about it. */
const list = defineQuery({
  name: "reviews.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    const { tx } = context;
    const self = await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const reviews = await tx.review.findMany({
      where: { dealId },
      orderBy: { askedAt: "desc" },
      include: { answers: { orderBy: { at: "asc" } }, run: { select: { number: true } } },
    });
    const hash = reviews.length > 0 ? await currentHash(context, workspaceId, dealId) : "";
    const nameOf = await peopleNames(
      tx,
      reviews.flatMap((review) => [
        review.askedById,
        ...(review.reviewers as string[]),
        ...review.answers.map(({ userId }) => userId),
      ]),
    );
    const members = await tx.member.findMany({ where: { workspaceId }, include: { user: true } });
    const { settings } = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    return {
      may: { ask: mayAsk(self), manage: mayManage(self) },
      settings: settingsOf(settings),
      candidates: members
        .filter((row) => row.userId !== self.userId && mayWork({ role: row.role as never }))
        .map(({ userId, user, role }) => ({ userId, name: user.name, role })),
      reviews: reviews.map((review) => ({
        id: review.id,
        runId: review.runId,
        run: review.run.number,
        state: review.state as "open" | "signed" | "sentBack" | "withdrawn",
        holds: review.requestHash === hash,
        requestHash: review.requestHash,
        note: review.note,
        needed: review.needed,
        checklist: review.checklist as string[],
        askedBy: nameOf(review.askedById),
        askedAt: review.askedAt.toISOString(),
        reviewers: (review.reviewers as string[]).map(nameOf),
        answers: review.answers.map(({ userId, answer, reason, at }) => ({
          by: nameOf(userId),
          answer: answer as "signed" | "sentBack",
          reason,
          at: at.toISOString(),
        })),
        may: {
          answer: mayAnswer(self, subjectOf(review)),
          withdraw: mayWithdraw(self, subjectOf(review)),
        },
      })),
    };
  },
});

/** A review with the very request and report that it was about, to be taken away. */
const open = defineQuery({
  name: "reviews.open",
  input: reviewInput,
  async run({ tx, member }, { workspaceId, reviewId }) {
    await member(workspaceId);
    const review = await tx.review.findFirst({
      where: { id: reviewId, workspaceId },
      include: { answers: { orderBy: { at: "asc" } }, run: true },
    });
    if (!review) throw notFound("review");
    const nameOf = await peopleNames(tx, [review.askedById, ...review.answers.map(({ userId }) => userId)]);
    return {
      state: review.state,
      run: review.run.number,
      requestHash: review.requestHash,
      engine: review.run.engine,
      note: review.note,
      checklist: review.checklist as string[],
      askedBy: nameOf(review.askedById),
      askedAt: review.askedAt.toISOString(),
      answers: review.answers.map(({ userId, answer, reason, checks, at }) => ({
        by: nameOf(userId),
        answer,
        reason,
        checks: checks as boolean[],
        at: at.toISOString(),
      })),
      request: unpackedRequest(review.run.request),
      report: unpackedReport(review.run.report),
    };
  },
});

/** What every review of the workspace needs. */
const settings = defineQuery({
  name: "reviews.settings",
  input: inWorkspace,
  async run({ tx, member }, { workspaceId }) {
    const self = await member(workspaceId);
    const workspace = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    return { may: { manage: mayManage(self) }, settings: settingsOf(workspace.settings) };
  },
});

export const queries = { standing, list, open, settings };
