import { randomUUID } from "node:crypto";
import { notFound, refuse, staleVersion } from "../platform/errors";
import { type CommandContext, defineCommand, type QueryContext } from "../platform/operation";
import { asEditor } from "../workspaces/guards";
import { createInput, type ScenarioContent, saveInput, scenarioInput } from "./schema";

const MOST = 200;

/** Keeps a named stress scenario for the whole workspace. */
const create = defineCommand({
  name: "scenarios.create",
  input: createInput,
  async run(context, { workspaceId, name, content }) {
    await asEditor(context, workspaceId, "keep scenarios");
    const { tx, actor, now } = context;
    await refuseSameName(context, workspaceId, name, null);
    if ((await tx.scenario.count({ where: { workspaceId } })) >= MOST)
      throw refuse("limited", "tooMany", `A workspace keeps at most ${MOST} scenarios: delete one first.`);
    const id = randomUUID();
    await tx.scenario.create({
      data: { id, workspaceId, name, content, createdById: actor.userId, createdAt: now },
    });
    await tell(context, workspaceId, id, "scenario.created", undefined, { name, content });
    return { scenarioId: id };
  },
});

const save = defineCommand({
  name: "scenarios.save",
  input: saveInput,
  async run(context, { workspaceId, scenarioId, version, name, content }) {
    await asEditor(context, workspaceId, "keep scenarios");
    const before = await scenarioIn(context, workspaceId, scenarioId, true);
    const was = { name: before.name, content: before.content as ScenarioContent };
    if (before.version !== version) throw staleVersion("scenario", { version: before.version, ...was });
    await refuseSameName(context, workspaceId, name, scenarioId);
    const data = { name, content, version: version + 1 };
    await context.tx.scenario.update({ where: { id: scenarioId }, data });
    await tell(context, workspaceId, scenarioId, "scenario.saved", was, { name, content });
    return { version: version + 1 };
  },
});

const remove = defineCommand({
  name: "scenarios.remove",
  input: scenarioInput,
  async run(context, { workspaceId, scenarioId }) {
    await asEditor(context, workspaceId, "delete scenarios");
    const { name, content } = await scenarioIn(context, workspaceId, scenarioId, true);
    await context.tx.scenario.delete({ where: { id: scenarioId } });
    await tell(context, workspaceId, scenarioId, "scenario.removed", { name, content }, undefined);
    return null;
  },
});

/** Two scenarios of one name could not be told apart. */
async function refuseSameName(
  { tx }: QueryContext,
  workspaceId: string,
  name: string,
  except: string | null,
): Promise<void> {
  const same = await tx.scenario.findFirst({ where: { workspaceId, name }, select: { id: true } });
  if (same && same.id !== except)
    throw refuse("conflict", "sameName", `There is a scenario named ${name} already.`, "name");
}

/** The scenario, if it is the workspace's; locked when it is about to be written. */
async function scenarioIn({ tx }: QueryContext, workspaceId: string, scenarioId: string, isLocked = false) {
  if (isLocked) await tx.$queryRaw`SELECT id FROM "scenario" WHERE id = ${scenarioId} FOR UPDATE`;
  const scenario = await tx.scenario.findFirst({ where: { id: scenarioId, workspaceId } });
  if (!scenario) throw notFound("scenario");
  return scenario;
}

async function tell(
  { record, emit }: CommandContext,
  workspaceId: string,
  scenarioId: string,
  kind: string,
  before: unknown,
  after: unknown,
): Promise<void> {
  await record({ workspaceId, kind, subjectKind: "scenario", subjectId: scenarioId, before, after });
  await emit({ workspaceId, kind, payload: { scenarioId } });
}

export const commands = { create, save, remove };
