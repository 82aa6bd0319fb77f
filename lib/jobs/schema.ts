import { z } from "zod";
import { dealInput } from "../deals/schema";
import { gridSchema } from "../pricing/stressGrid";
import { inWorkspace } from "../workspaces/schema";

/** `request` is what is typed, saved or not; its own checks say what is wrong with it. */
export const startInput = dealInput.extend({ request: z.unknown(), grid: gridSchema });
export const jobInput = inWorkspace.extend({ jobId: z.string().min(1).max(100) });
