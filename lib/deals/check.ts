import { type Problem, Refusal } from "../platform/errors";
import { checkRequest } from "../pricing/refusals";
import { type DealParts, toRequest } from "./request";
import type { DealClass } from "./schema";

/** Where a problem of the request stands on the deal's own form. */
const fields: readonly (readonly [RegExp, string])[] = [
  [/^tranches/, "content.classes"],
  [/^schedule\.maturity/, "content.maturity"],
  [/^schedule\.years/, "content.years"],
  [/^correlation/, "content.correlation"],
  [/^nthToDefault/, "content.nthToDefault"],
  [/^correlation\.index\.pool/, "content.correlation"],
  [/^pool/, "poolId"],
  [/^(discount|pricingDate|schedule)/, "marketId"],
  [/^law/, "content.law"],
];

/** Everything wrong with a deal, beside its own fields. @throws Refusal with all problems at once. */
export function checkDeal(parts: DealParts): void {
  const checked = checkRequest(toRequest(parts));
  const problems: Problem[] = checked.ok
    ? []
    : checked.problems.map((problem) => ({ ...problem, path: dealPath(problem.path) }));
  problems.push(...overlapProblems(parts.content.classes));
  if (problems.length > 0) throw new Refusal("invalid", problems);
}

export function dealPath(path: string): string {
  const found = fields.find(([pattern]) => pattern.test(path));
  if (!found) return path;
  const [pattern, field] = found;
  return field === "poolId" || field === "marketId" ? field : path.replace(pattern, field);
}

/** A deal's own capital structure may not overlap. */
export function overlapProblems(classes: readonly DealClass[]): Problem[] {
  const problems: Problem[] = [];
  for (const [i, one] of classes.entries()) {
    for (const other of classes.slice(0, i)) {
      if (one.attachment < other.detachment - 1e-12 && other.attachment < one.detachment - 1e-12) {
        const message = `Class ${one.name} overlaps class ${other.name}: classes of one deal may touch, not overlap.`;
        problems.push({ code: "overlap", path: `content.classes.${i}`, message });
      }
    }
  }
  return problems;
}
