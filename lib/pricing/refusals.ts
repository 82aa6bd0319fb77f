import { z } from "zod";
import { correlationProblems } from "./checks/correlationProblems";
import { discountProblems } from "./checks/discountProblems";
import { problemsOf } from "./checks/formProblems";
import { asArray, asObject } from "./checks/loose";
import { poolProblems } from "./checks/poolProblems";
import { dateProblems } from "./checks/scheduleProblems";
import { cutLists } from "./checks/sizes";
import { contractProblems, trancheProblems } from "./checks/trancheProblems";
import { workProblems } from "./checks/workProblems";
import type { PricingProblem } from "./problem";
import { type PricingRequest, requestSchema } from "./request";

/** A request that passed every check of form and sense, or all its problems at once. */
export type Checked =
  | { readonly ok: true; readonly request: PricingRequest }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/** Checks a request of unknown origin: form, ranges, and what fields say to each other. All problems at once. */
export function checkRequest(request: unknown): Checked {
  const raw = cutLists(request);
  const parsed = requestSchema.safeParse(raw);
  const problems = parsed.success ? [] : problemsOf(parsed.error, raw);
  problems.push(...senseProblems(raw));
  if (parsed.success) problems.push(...workProblems(parsed.data));
  if (problems.length > 0) return { ok: false, problems: withoutRepeats(problems) };
  if (!parsed.success)
    return { ok: false, problems: [{ code: "form", path: "", message: "This is not a pricing request." }] };
  return { ok: true, request: parsed.data };
}

/** Problems of the names of a pool alone, by the rules of the request; paths start with `pool`. */
export function poolNameProblems(names: unknown): PricingProblem[] {
  const raw = { pool: names };
  const parsed = z.object({ pool: requestSchema.shape.pool }).safeParse(raw);
  const form = parsed.success ? [] : problemsOf(parsed.error, raw);
  return withoutRepeats([...form, ...poolProblems(asArray(names), ["pool"], raw)]);
}

/** What the fields say to each other, read from whatever is well formed in the raw request. */
function senseProblems(raw: unknown): PricingProblem[] {
  const request = asObject(raw);
  return [
    ...dateProblems(request, raw),
    ...discountProblems(asObject(request.discount), asObject(request.schedule), raw),
    ...poolProblems(asArray(request.pool), ["pool"], raw),
    ...correlationProblems(request, raw),
    ...trancheProblems(asArray(request.tranches), raw),
    ...contractProblems(request, raw),
  ];
}

function withoutRepeats(problems: readonly PricingProblem[]): PricingProblem[] {
  const seen = new Set<string>();
  return problems.filter(({ path, code }) => {
    const key = `${path} ${code}`;
    if (seen.has(key)) return false;
    seen.add(key);
    return true;
  });
}
