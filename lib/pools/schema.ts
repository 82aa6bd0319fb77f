import { z } from "zod";
import { LIMITS } from "../pricing/request";
import { inWorkspace } from "../workspaces/schema";

export const poolName = z
  .string()
  .trim()
  .min(1, "Give the pool a name.")
  .max(120, "A name has at most 120 characters.");
const currency = z.string().regex(/^[A-Z]{3}$/, "A currency is three capital letters, as EUR.");
/** Names are checked by the request's own rules in the command, so that all problems come with their rows. */
const names = z.array(z.unknown()).max(LIMITS.names, `A pool holds at most ${LIMITS.names} names.`);
const version = z.number().int();

export const createInput = inWorkspace.extend({ name: poolName, currency, names });
export const poolInput = inWorkspace.extend({ poolId: z.string().min(1).max(100) });
export const saveInput = poolInput.extend({ version, name: poolName, currency, names });
export const archiveInput = poolInput.extend({ archived: z.boolean() });
export const copyInput = poolInput.extend({ name: poolName });
