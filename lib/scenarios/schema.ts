import { z } from "zod";
import { shockSchema } from "../pricing/shock";
import { inWorkspace } from "../workspaces/schema";

const scenarioName = z
  .string()
  .trim()
  .min(1, "Give the scenario a name.")
  .max(120, "A name has at most 120 characters.");

/** What a scenario holds: the shock, and why it is kept. */
export const scenarioContent = z.strictObject({
  shock: shockSchema,
  note: z.string().trim().max(500, "A note has at most 500 characters.").default(""),
});
export type ScenarioContent = z.infer<typeof scenarioContent>;

export const createInput = inWorkspace.extend({ name: scenarioName, content: scenarioContent });
export const scenarioInput = inWorkspace.extend({ scenarioId: z.string().min(1).max(100) });
export const saveInput = scenarioInput.extend({
  version: z.number().int(),
  name: scenarioName,
  content: scenarioContent,
});
