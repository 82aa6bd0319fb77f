import { computeOnServer } from "../compute/serverPool";
import type { PricingRequest } from "../pricing/request";
import { cellShock, type StressCell, type StressGrid } from "../pricing/stressGrid";

/** What a stress grid is asked of. */
export interface GridInput {
  readonly request: PricingRequest;
  readonly grid: StressGrid;
}

/** Works one cell of a grid out in a pricing thread; a shock that cannot be priced is an answer, with its reasons. */
export function workedCell({ request, grid }: GridInput, index: number, person: string): Promise<StressCell> {
  return computeOnServer("shocked", { request, shock: cellShock(grid, index) }, person);
}
