import { notFound } from "../platform/errors";
import type { QueryContext } from "../platform/operation";

/** The deal, if it is the workspace's; locked when it is about to be written. */
export async function dealIn({ tx }: QueryContext, workspaceId: string, dealId: string, isLocked = false) {
  if (isLocked) await tx.$queryRaw`SELECT id FROM "deal" WHERE id = ${dealId} FOR UPDATE`;
  const deal = await tx.deal.findFirst({ where: { id: dealId, workspaceId } });
  if (!deal) throw notFound("deal");
  return deal;
}
