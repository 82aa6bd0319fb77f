import { z } from "zod";
import { peopleNames } from "../platform/accounts/peopleNames";
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
    const nameOf = await peopleNames(
      tx,
      rows.map((row) => row.actorId),
    );
    return {
      rows: rows.map(
        ({ id, actorId, kind, subjectKind, subjectId, dealId: deal, before: was, after, at }) => ({
          id: String(id),
          by: nameOf(actorId),
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
