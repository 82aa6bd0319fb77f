import { randomUUID } from "node:crypto";
import { notify } from "../notices/notify";
import { notFound, refuse } from "../platform/errors";
import { type CommandContext, defineCommand, type QueryContext } from "../platform/operation";
import { mayManage, mayWork, need } from "../workspaces/policy";
import { mayAnswer, mayAsk, mayWithdraw, type ReviewSubject } from "./policy";
import { answerInput, askInput, reviewInput, settingsInput, settingsOf } from "./schema";

/** Puts a run before named people, with the workspace's checklist as it is now. */
const ask = defineCommand({
  name: "reviews.ask",
  input: askInput,
  async run(context, { workspaceId, runId, reviewers, note }) {
    const { tx, actor, now, member, record, emit } = context;
    const self = await member(workspaceId);
    need(mayAsk(self), self.role, "ask for a review");
    const run = await tx.run.findFirst({
      where: { id: runId, workspaceId },
      select: { id: true, dealId: true, number: true, requestHash: true },
    });
    if (!run) throw notFound("run");
    await tx.$queryRaw`SELECT id FROM "deal" WHERE id = ${run.dealId} FOR UPDATE`;
    if (await tx.review.findFirst({ where: { runId, state: "open" }, select: { id: true } }))
      throw refuse("conflict", "alreadyAsked", `Run ${run.number} is under review already.`);
    const { settings } = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    const { checklist, needed } = settingsOf(settings);
    await checkReviewers(context, workspaceId, reviewers, needed);
    const { dealId, requestHash } = run;
    const id = randomUUID();
    await tx.review.create({
      data: {
        id,
        workspaceId,
        dealId,
        runId,
        requestHash,
        note,
        reviewers: [...new Set(reviewers)],
        checklist,
        needed,
        askedById: actor.userId,
        askedAt: now,
      },
    });
    const after = { run: run.number, requestHash, reviewers, needed, note };
    await record({ workspaceId, dealId, kind: "review.asked", subjectKind: "review", subjectId: id, after });
    await emit({ workspaceId, dealId, kind: "review.asked", payload: { dealId, reviewId: id } });
    const payload = { reviewId: id, run: run.number, words: note };
    await notify(context, reviewers, { workspaceId, dealId, kind: "review.asked", payload });
    return { reviewId: id };
  },
});

/** Signs a run off or sends it back. Check and act hold the review's lock: two answers at once make one transition. */
const answer = defineCommand({
  name: "reviews.answer",
  input: answerInput,
  async run(context, { workspaceId, reviewId, answer: given, reason, checks }) {
    const { tx, actor, now, member, record, emit } = context;
    const self = await member(workspaceId);
    const review = await reviewIn(context, workspaceId, reviewId);
    if (review.askedById === self.userId)
      throw refuse("forbidden", "ownRequest", "You asked for this review: someone else must answer it.");
    need(mayWork(self), self.role, "sign off or send back");
    if (review.state !== "open")
      throw refuse("conflict", "closed", "This review is closed: someone has answered it meanwhile.");
    const subject = subjectOf(review);
    if (!mayAnswer(self, subject))
      throw refuse(
        "forbidden",
        "notReviewer",
        subject.answered.includes(self.userId)
          ? "You have answered this review already."
          : "This review was asked of other people.",
      );
    const checklist = review.checklist as string[];
    if (given === "signed" && (checks.length !== checklist.length || checks.includes(false)))
      throw refuse("invalid", "unchecked", "Check every line of the list before you sign.", "checks");
    if (given === "sentBack" && reason === "")
      throw refuse("invalid", "noReason", "Say why you send it back.", "reason");
    await tx.reviewAnswer.create({
      data: { reviewId, userId: actor.userId, answer: given, reason, checks, at: now },
    });
    const signed =
      review.answers.filter((row) => row.answer === "signed").length + (given === "signed" ? 1 : 0);
    const state = given === "sentBack" ? "sentBack" : signed >= review.needed ? "signed" : "open";
    await tx.review.update({
      where: { id: reviewId },
      data: { state, closedAt: state === "open" ? null : now },
    });
    const { dealId } = review;
    const kind = `review.${given}`;
    const after = { run: review.run.number, requestHash: review.requestHash, answer: given, reason, state };
    await record({ workspaceId, dealId, kind, subjectKind: "review", subjectId: reviewId, after });
    await emit({ workspaceId, dealId, kind, payload: { dealId, reviewId, state } });
    const payload = { reviewId, run: review.run.number, answer: given, words: reason };
    await notify(context, [review.askedById], { workspaceId, dealId, kind: "review.answered", payload });
    return { state };
  },
});

const withdraw = defineCommand({
  name: "reviews.withdraw",
  input: reviewInput,
  async run(context, { workspaceId, reviewId }) {
    const { tx, now, member, record, emit } = context;
    const self = await member(workspaceId);
    const review = await reviewIn(context, workspaceId, reviewId);
    if (review.state !== "open") throw refuse("conflict", "closed", "This review is closed already.");
    need(mayWithdraw(self, subjectOf(review)), self.role, "take back someone else's request");
    await tx.review.update({ where: { id: reviewId }, data: { state: "withdrawn", closedAt: now } });
    const { dealId } = review;
    const after = { run: review.run.number, requestHash: review.requestHash };
    await record({
      workspaceId,
      dealId,
      kind: "review.withdrawn",
      subjectKind: "review",
      subjectId: reviewId,
      after,
    });
    await emit({ workspaceId, dealId, kind: "review.withdrawn", payload: { dealId, reviewId } });
    return null;
  },
});

/** The checklist of the workspace and how many must sign; reviews already asked keep theirs. */
const saveSettings = defineCommand({
  name: "reviews.saveSettings",
  input: settingsInput,
  async run({ tx, member, record, emit }, { workspaceId, settings }) {
    const self = await member(workspaceId);
    need(mayManage(self), self.role, "change what a review needs");
    await tx.$queryRaw`SELECT id FROM "workspace" WHERE id = ${workspaceId} FOR UPDATE`;
    const { settings: stored } = await tx.workspace.findUniqueOrThrow({ where: { id: workspaceId } });
    await tx.workspace.update({
      where: { id: workspaceId },
      data: { settings: { ...(stored as object), review: settings } },
    });
    await record({
      workspaceId,
      kind: "review.settingsSaved",
      subjectKind: "workspace",
      subjectId: workspaceId,
      before: settingsOf(stored),
      after: settings,
    });
    await emit({ workspaceId, kind: "review.settingsSaved", payload: {} });
    return null;
  },
});

async function checkReviewers(
  { tx, actor }: CommandContext,
  workspaceId: string,
  reviewers: readonly string[],
  needed: number,
): Promise<void> {
  const named = [...new Set(reviewers)];
  if (named.includes(actor.userId))
    throw refuse(
      "invalid",
      "ownRequest",
      "You cannot review your own request: name other people.",
      "reviewers",
    );
  const members = await tx.member.findMany({ where: { workspaceId, userId: { in: named } } });
  if (members.filter(mayWorkRow).length < named.length)
    throw refuse(
      "invalid",
      "notReviewer",
      "Every reviewer must be a member of the workspace who is more than a viewer.",
      "reviewers",
    );
  if (named.length < needed)
    throw refuse(
      "invalid",
      "tooFew",
      `${needed} people must sign here: name at least as many reviewers.`,
      "reviewers",
    );
}

function mayWorkRow({ role }: { role: string }): boolean {
  return mayWork({ role: role as never });
}

/** The review, if it is the workspace's; locked until the transaction ends. */
async function reviewIn({ tx }: QueryContext, workspaceId: string, reviewId: string) {
  await tx.$queryRaw`SELECT id FROM "review" WHERE id = ${reviewId} FOR UPDATE`;
  const review = await tx.review.findFirst({
    where: { id: reviewId, workspaceId },
    include: { answers: true, run: { select: { number: true } } },
  });
  if (!review) throw notFound("review");
  return review;
}

export function subjectOf(review: {
  readonly state: string;
  readonly askedById: string;
  readonly reviewers: unknown;
  readonly answers: readonly { readonly userId: string }[];
}): ReviewSubject {
  const { state, askedById, answers } = review;
  return {
    state,
    askedById,
    reviewers: review.reviewers as string[],
    answered: answers.map(({ userId }) => userId),
  };
}

export const commands = { ask, answer, withdraw, saveSettings };
