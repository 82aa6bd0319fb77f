import type { PricingProblem } from "../problem";
import { asArray, asObject, isNumber, type Loose } from "./loose";
import { problem } from "./wording";

/** Strikes closer than this are one strike to double precision. */
export const NARROWEST_TRANCHE = 1e-9;

/** Strikes in the wrong order, an upfront without a coupon, ids given twice. */
export function trancheProblems(tranches: readonly unknown[], raw: unknown): PricingProblem[] {
  const problems: PricingProblem[] = [];
  const seen = new Map<string, number>();
  for (const [i, row] of tranches.entries()) {
    const { id, attachment, detachment, running, upfront } = asObject(row);
    const path = ["tranches", String(i)];
    if (isNumber(attachment) && isNumber(detachment) && detachment - attachment < NARROWEST_TRANCHE) {
      problems.push(
        problem(
          "strikes",
          path,
          raw,
          `must attach below where it detaches, not at ${attachment} and ${detachment}`,
        ),
      );
    }
    if (upfront !== undefined && running === undefined) {
      problems.push(
        problem("missing", [...path, "running"], raw, "is missing: an upfront is quoted at a running coupon"),
      );
    }
    if (typeof id === "string") {
      const first = seen.get(id);
      if (first !== undefined)
        problems.push(
          problem("duplicate", [...path, "id"], raw, `is already the id of tranche ${first + 1}`),
        );
      else seen.set(id, i);
    }
  }
  return problems;
}

/** n-th-to-default contracts beyond the names of the pool. */
export function contractProblems(request: Loose, raw: unknown): PricingProblem[] {
  const problems: PricingProblem[] = [];
  const names = asArray(request.pool).length;
  for (const [i, n] of asArray(request.nthToDefault).entries()) {
    if (!isNumber(n)) continue;
    if (!Number.isInteger(n) || n < 1 || n > names) {
      problems.push(
        problem(
          "range",
          ["nthToDefault", String(i)],
          raw,
          `must be a whole number from 1 to the ${names} names of the pool`,
        ),
      );
    }
  }
  return problems;
}
