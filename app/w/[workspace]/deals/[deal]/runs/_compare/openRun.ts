import type { Operations } from "@/lib/operations";

export type OpenRun = Operations["runs.open"]["output"];
