import { queries as activityQueries } from "./activity/queries";
import { commands as alternativeCommands } from "./alternatives/commands";
import { queries as alternativeQueries } from "./alternatives/queries";
import { commands as dealCommands } from "./deals/commands";
import { queries as dealQueries } from "./deals/queries";
import { commands as discussionCommands } from "./discussion/commands";
import { queries as discussionQueries } from "./discussion/queries";
import { commands as jobCommands } from "./jobs/commands";
import { queries as jobQueries } from "./jobs/queries";
import { commands as marketCommands } from "./markets/commands";
import { queries as marketQueries } from "./markets/queries";
import { commands as noticeCommands } from "./notices/commands";
import { queries as noticeQueries } from "./notices/queries";
import type { AnyOperation } from "./platform/run";
import { commands as poolCommands } from "./pools/commands";
import { queries as poolQueries } from "./pools/queries";
import { commands as reviewCommands } from "./reviews/commands";
import { queries as reviewQueries } from "./reviews/queries";
import { commands as runCommands } from "./runs/commands";
import { queries as runQueries } from "./runs/queries";
import { commands as scenarioCommands } from "./scenarios/commands";
import { queries as scenarioQueries } from "./scenarios/queries";
import { commands as workspaceCommands } from "./workspaces/commands";
import { queries as workspaceQueries } from "./workspaces/queries";

const rooms = [
  workspaceCommands,
  workspaceQueries,
  poolCommands,
  poolQueries,
  marketCommands,
  marketQueries,
  dealCommands,
  dealQueries,
  runCommands,
  runQueries,
  reviewCommands,
  reviewQueries,
  scenarioCommands,
  scenarioQueries,
  alternativeCommands,
  alternativeQueries,
  jobCommands,
  jobQueries,
  discussionCommands,
  discussionQueries,
  noticeCommands,
  noticeQueries,
  activityQueries,
] as const;

type OperationOf<Room> = Room extends unknown ? Room[keyof Room] : never;
type KnownOperation = OperationOf<(typeof rooms)[number]>;

/** Every operation by its name, with the types of what goes in and comes out: what screens call by name. */
export type Operations = {
  [Known in KnownOperation as Known extends { name: infer Name extends string }
    ? Name
    : never]: Known extends {
    input: { _output: infer Input };
    run: (...args: never[]) => Promise<infer Output>;
  }
    ? { input: Input; output: Output }
    : never;
};

/** All commands and queries of all rooms. */
export const operations: readonly AnyOperation[] = rooms.flatMap(
  (room) => Object.values(room) as AnyOperation[],
);

const byName = new Map(operations.map((operation) => [operation.name, operation]));

/** The operation of a name, or undefined. */
export function findOperation(name: string): AnyOperation | undefined {
  return byName.get(name);
}
