import { randomUUID } from "node:crypto";
import { overlapProblems } from "../deals/check";
import { dealIn } from "../deals/find";
import { notFound, Refusal, refuse } from "../platform/errors";
import { defineCommand } from "../platform/operation";
import { asEditor } from "../workspaces/guards";
import { alternativeInput, keepInput } from "./schema";

const MOST = 30;

/** Keeps a structure beside a deal, to compare with; the deal itself stays as it is. */
const keep = defineCommand({
  name: "alternatives.keep",
  input: keepInput,
  async run(context, { workspaceId, dealId, name, content }) {
    await asEditor(context, workspaceId, "keep alternatives");
    const { tx, actor, now, record, emit } = context;
    await dealIn(context, workspaceId, dealId, true);
    const problems = overlapProblems(content.classes);
    if (problems.length > 0) throw new Refusal("invalid", problems);
    if ((await tx.alternative.count({ where: { dealId } })) >= MOST)
      throw refuse("limited", "tooMany", `A deal keeps at most ${MOST} alternatives: delete one first.`);
    const id = randomUUID();
    await tx.alternative.create({
      data: { id, workspaceId, dealId, name, content, createdById: actor.userId, createdAt: now },
    });
    const subject = { subjectKind: "alternative", subjectId: id };
    await record({ workspaceId, dealId, kind: "alternative.kept", ...subject, after: { name, content } });
    await emit({ workspaceId, dealId, kind: "alternative.kept", payload: { alternativeId: id } });
    return { alternativeId: id };
  },
});

const remove = defineCommand({
  name: "alternatives.remove",
  input: alternativeInput,
  async run(context, { workspaceId, dealId, alternativeId }) {
    await asEditor(context, workspaceId, "delete alternatives");
    const { tx, record, emit } = context;
    const found = await tx.alternative.findFirst({ where: { id: alternativeId, dealId, workspaceId } });
    if (!found) throw notFound("alternative");
    await tx.alternative.delete({ where: { id: alternativeId } });
    const { name, content } = found;
    const subject = { subjectKind: "alternative", subjectId: alternativeId };
    await record({ workspaceId, dealId, kind: "alternative.removed", ...subject, before: { name, content } });
    await emit({ workspaceId, dealId, kind: "alternative.removed", payload: { alternativeId } });
    return null;
  },
});

export const commands = { keep, remove };
