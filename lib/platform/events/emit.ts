import type { Prisma } from "@/lib/generated/prisma/client";
import type { Transaction } from "../db/client";
import { CHANNEL } from "./channel";

/** What open pages are told. */
export interface EventRecord {
  readonly workspaceId: string;
  readonly dealId?: string | undefined;
  readonly kind: string;
  readonly payload: Readonly<Record<string, unknown>>;
}

/** Writes an event and tells every process of it once the transaction commits; numbers rise in commit order. */
export async function emitEvent(tx: Transaction, event: EventRecord, now: Date): Promise<void> {
  await tx.$executeRaw`SELECT pg_advisory_xact_lock(hashtext(${event.workspaceId}))`;
  const { id } = await tx.event.create({
    data: {
      workspaceId: event.workspaceId,
      dealId: event.dealId ?? null,
      kind: event.kind,
      payload: event.payload as Prisma.InputJsonObject,
      at: now,
    },
  });
  await tx.$executeRaw`SELECT pg_notify(${CHANNEL}, ${`${event.workspaceId} ${id}`})`;
}
