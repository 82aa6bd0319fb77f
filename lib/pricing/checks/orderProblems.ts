import type { PricingProblem } from "../problem";
import { asObject, isNumber } from "./loose";
import { problem } from "./wording";

/** Nodes must come in rising order of one field. */
export function orderProblems(
  nodes: readonly unknown[],
  field: string,
  path: readonly string[],
  raw: unknown,
): PricingProblem[] {
  const problems: PricingProblem[] = [];
  for (let i = 1; i < nodes.length; i++) {
    const before = asObject(nodes[i - 1])[field];
    const here = asObject(nodes[i])[field];
    if (isNumber(before) && isNumber(here) && here <= before) {
      problems.push(
        problem("order", [...path, String(i), field], raw, "must be above that of the node before it"),
      );
    }
  }
  return problems;
}
