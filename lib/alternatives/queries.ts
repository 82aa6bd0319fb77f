import { dealIn } from "../deals/find";
import { dealInput } from "../deals/schema";
import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery } from "../platform/operation";
import type { AlternativeContent } from "./schema";

/** A deal's alternatives, oldest first. */
const list = defineQuery({
  name: "alternatives.list",
  input: dealInput,
  async run(context, { workspaceId, dealId }) {
    await context.member(workspaceId);
    await dealIn(context, workspaceId, dealId);
    const rows = await context.tx.alternative.findMany({ where: { dealId }, orderBy: { createdAt: "asc" } });
    const nameOf = await peopleNames(
      context.tx,
      rows.map((row) => row.createdById),
    );
    return {
      alternatives: rows.map(({ id, name, content, createdById, createdAt }) => ({
        id,
        name,
        content: content as AlternativeContent,
        by: nameOf(createdById),
        at: createdAt.toISOString(),
      })),
    };
  },
});

export const queries = { list };
