import type { PricingProblem } from "../problem";
import { asArray, asObject, isNumber } from "./loose";
import { orderProblems } from "./orderProblems";
import { problem } from "./wording";

/** Ids given twice, nodes out of order, cumulative probabilities that fall; `path` is where the pool stands. */
export function poolProblems(
  pool: readonly unknown[],
  path: readonly string[],
  raw: unknown,
): PricingProblem[] {
  const problems: PricingProblem[] = [];
  const seen = new Map<string, number>();
  for (const [i, row] of pool.entries()) {
    const { id, credit: rawCredit } = asObject(row);
    if (typeof id === "string") {
      const first = seen.get(id);
      if (first !== undefined)
        problems.push(
          problem("duplicate", [...path, String(i), "id"], raw, `is already the id of row ${first + 1}`),
        );
      else seen.set(id, i);
    }
    const credit = asObject(rawCredit);
    const nodes = asArray(credit.nodes);
    const nodePath = [...path, String(i), "credit", "nodes"];
    problems.push(...orderProblems(nodes, "years", nodePath, raw));
    if (credit.kind === "cumulative") {
      for (let k = 1; k < nodes.length; k++) {
        const before = asObject(nodes[k - 1]).probability;
        const here = asObject(nodes[k]).probability;
        if (isNumber(before) && isNumber(here) && here < before) {
          problems.push(
            problem(
              "order",
              [...nodePath, String(k), "probability"],
              raw,
              "must not be below that of the node before it",
            ),
          );
        }
      }
    }
  }
  return problems;
}
