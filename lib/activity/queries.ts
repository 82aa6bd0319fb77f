import { z } from "zod";
import { defineQuery } from "../platform/operation";
import { inWorkspace } from "../workspaces/schema";

const PAGE = 100;
const listInput = inWorkspace.extend({
  dealId: z.string().max(100).optional(),
  before: z.string().regex(/^\d+$/).optional(),
});

const list = defineQuery({
  name: "activity.list",
  input: listInput,
  async run({ tx, member }, { workspaceId, dealId, before }) {
    await member(workspaceId);
    const rows = await tx.activity.findMany({
      where: {
        workspaceId,
        ...(dealId ? { dealId } : {}),
        ...(before ? { id: { lt: BigInt(before) } } : {}),
      },
      orderBy: { id: "desc" },
      take: PAGE,
    });
    const people = await tx.user.findMany({
      where: { id: { in: rows.map((row) => row.actorId) } },
      select: { id: true, name: true },
    });
    const names = new Map(people.map((person) => [person.id, person.name]));
    return {
      rows: rows.map(
        ({ id, actorId, kind, subjectKind, subjectId, dealId: deal, before: was, after, at }) => ({
          id: String(id),
          by: names.get(actorId) ?? "a former member",
          kind,
          subjectKind,
          subjectId,
          dealId: deal,
          before: was,
          after,
          at: at.toISOString(),
        }),
      ),
      isLast: rows.length < PAGE,
    };
  },
});

export const queries = { list };
