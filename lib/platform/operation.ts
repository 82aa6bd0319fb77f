import type { z } from "zod";
import type { Actor, Membership } from "./accounts/actor";
import type { Transaction } from "./db/client";
import type { EventRecord } from "./events/emit";

/** What changed, for the append-only record. */
export interface ActivityRecord {
  readonly workspaceId: string;
  readonly kind: string;
  readonly subjectKind: string;
  readonly subjectId: string;
  readonly dealId?: string | undefined;
  readonly before?: unknown;
  readonly after?: unknown;
}

/** What a query sees: a transaction, the person, the time, and the person's place in a workspace. */
export interface QueryContext {
  readonly tx: Transaction;
  readonly actor: Actor;
  readonly now: Date;
  /** The actor's membership; refuses with notFound when they are no member (other workspaces do not exist). */
  member(workspaceId: string): Promise<Membership>;
}

/** A command may also write the activity record and the event, in the same transaction as its write. */
export interface CommandContext extends QueryContext {
  record(activity: ActivityRecord): Promise<void>;
  emit(event: EventRecord): Promise<void>;
}

/** Runs a query for the same person before a command's transaction starts. */
export type Ask = <Input, Output>(query: Query<string, Input, Output>, input: Input) => Promise<Output>;

export interface Command<Name extends string = string, Input = never, Output = unknown, Prepared = never> {
  readonly kind: "command";
  readonly name: Name;
  readonly input: z.ZodType<Input>;
  /** Slow work (pricing) that must not hold a transaction; its result is handed to `run`, which checks all rights again. */
  prepare?(input: Input, ask: Ask, actor: Actor): Promise<Prepared>;
  run(context: CommandContext, input: Input, prepared: Prepared): Promise<Output>;
}

export interface Query<Name extends string = string, Input = never, Output = unknown> {
  readonly kind: "query";
  readonly name: Name;
  readonly input: z.ZodType<Input>;
  run(context: QueryContext, input: Input): Promise<Output>;
}

/** Declares a command: one verb that changes something. `name` is `<concept>.<verb>`. */
export function defineCommand<const Name extends string, Input, Output, Prepared = undefined>(
  definition: Omit<Command<Name, Input, Output, Prepared>, "kind">,
): Command<Name, Input, Output, Prepared> {
  return { kind: "command", ...definition };
}

/** Declares a query: a read already limited to what the actor may see. */
export function defineQuery<const Name extends string, Input, Output>(
  definition: Omit<Query<Name, Input, Output>, "kind">,
): Query<Name, Input, Output> {
  return { kind: "query", ...definition };
}
