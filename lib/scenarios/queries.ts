import { peopleNames } from "../platform/accounts/peopleNames";
import { defineQuery } from "../platform/operation";
import { mayOf } from "../workspaces/policy";
import { inWorkspace } from "../workspaces/schema";
import type { ScenarioContent } from "./schema";

/** The workspace's scenarios by name. */
const list = defineQuery({
  name: "scenarios.list",
  input: inWorkspace,
  async run({ tx, member }, { workspaceId }) {
    const may = mayOf(await member(workspaceId));
    const scenarios = await tx.scenario.findMany({ where: { workspaceId }, orderBy: { name: "asc" } });
    const nameOf = await peopleNames(
      tx,
      scenarios.map((row) => row.createdById),
    );
    return {
      may,
      scenarios: scenarios.map(({ id, name, content, version, createdById }) => ({
        id,
        name,
        content: content as ScenarioContent,
        version,
        by: nameOf(createdById),
      })),
    };
  },
});

export const queries = { list };
