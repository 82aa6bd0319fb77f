import type { z } from "zod";
import { Prisma } from "@/lib/generated/prisma/client";
import type { Actor } from "./accounts/actor";
import { type Membership, roles } from "./accounts/actor";
import type { Database, Transaction } from "./db/client";
import { notFound, type Problem, Refusal, refuse } from "./errors";
import { emitEvent } from "./events/emit";
import type { Ask, Command, CommandContext, Query } from "./operation";

/** Any registered operation, whatever its input and output. */
// biome-ignore lint/suspicious/noExplicitAny: a registry holds operations of every type
export type AnyOperation = Command<string, any, unknown, any> | Query<string, any, unknown>;

/** On whose behalf, on what, and when. */
export interface Caller {
  readonly database: Database;
  readonly actor: Actor | null;
  readonly now?: Date;
}

const ATTEMPTS = 4;

/**
 * Runs one operation: parse (all problems at once), signed in, then everything in one transaction. A transaction that
 * lost a race with another is tried again.
 * @throws Refusal with data for every expected reason.
 */
export async function execute<Input, Output, Prepared>(
  operation: Command<string, Input, Output, Prepared> | Query<string, Input, Output>,
  raw: unknown,
  caller: Caller,
): Promise<Output> {
  const { actor, database } = caller;
  if (!actor) throw refuse("signedOut", "signedOut", "Sign in first.");
  const parsed = operation.input.safeParse(raw);
  if (!parsed.success) throw new Refusal("invalid", inputProblems(parsed.error));
  const input = parsed.data;
  const ask: Ask = (query, asked) => execute(query, asked, caller);
  const prepared = operation.kind === "command" ? await operation.prepare?.(input, ask, actor) : undefined;
  for (let attempt = 1; ; attempt++) {
    try {
      return await database.$transaction((tx) => {
        const context = contextOf(tx, actor, caller.now ?? new Date());
        return operation.kind === "command"
          ? operation.run(context, input, prepared as Prepared)
          : operation.run(context, input);
      });
    } catch (error) {
      if (attempt >= ATTEMPTS || !isLostRace(error)) throw error;
    }
  }
}

/** Zod's issues as problems. */
export function inputProblems(error: z.ZodError): Problem[] {
  return error.issues.map((issue) => ({
    code: "invalid",
    path: issue.path.map(String).join("."),
    message: issue.message,
  }));
}

function isLostRace(error: unknown): boolean {
  return error instanceof Prisma.PrismaClientKnownRequestError && ["P2034", "P2002"].includes(error.code);
}

function contextOf(tx: Transaction, actor: Actor, now: Date): CommandContext {
  return {
    tx,
    actor,
    now,
    member: (workspaceId) => membershipOf(tx, workspaceId, actor.userId),
    record: async ({ before, after, dealId, ...activity }) => {
      await tx.activity.create({
        data: {
          ...activity,
          actorId: actor.userId,
          dealId: dealId ?? null,
          ...jsonField("before", before),
          ...jsonField("after", after),
          at: now,
        },
      });
    },
    emit: (event) => emitEvent(tx, event, now),
  };
}

function jsonField(name: "before" | "after", value: unknown): Record<string, Prisma.InputJsonValue> {
  return value === undefined ? {} : { [name]: value as Prisma.InputJsonValue };
}

/** The actor's place in a workspace; other workspaces do not exist. */
export async function membershipOf(
  tx: Transaction,
  workspaceId: string,
  userId: string,
): Promise<Membership> {
  const member = await tx.member.findUnique({ where: { workspaceId_userId: { workspaceId, userId } } });
  const role = roles.find((known) => known === member?.role);
  if (!member || !role) throw notFound("workspace");
  return { workspaceId, userId, role };
}
