import type { Operations } from "@/lib/operations";

/** A pool as opened: names, version, deals that use it, and what this reader may do. */
export type OpenPool = Operations["pools.open"]["output"];
