import type { PricingProblem } from "../problem";
import { asArray, asObject, isNumber, type Loose } from "./loose";
import { orderProblems } from "./orderProblems";
import { problem } from "./wording";

/** Curve nodes out of order, par rates between whole years. */
export function discountProblems(discount: Loose, schedule: Loose, raw: unknown): PricingProblem[] {
  const nodes = asArray(discount.nodes);
  const problems = orderProblems(nodes, "years", ["discount", "nodes"], raw);
  for (const [i, node] of nodes.entries()) {
    const { years } = asObject(node);
    if (discount.kind === "par" && isNumber(years) && !Number.isInteger(years)) {
      const where = schedule.kind === "even" ? "" : " on this curve";
      problems.push(
        problem(
          "order",
          ["discount", "nodes", String(i), "years"],
          raw,
          `must be a whole number of years for a par rate${where}`,
        ),
      );
    }
  }
  return problems;
}
