import type { z } from "zod";
import type { PricingProblem } from "../problem";
import { valueAt } from "./loose";
import { problem } from "./wording";

/** Zod's issues as problems, with the row's id in the words. */
export function problemsOf(error: z.ZodError, raw: unknown): PricingProblem[] {
  return error.issues.flatMap((issue) => issueProblems(issue as z.core.$ZodIssue, raw));
}

function issueProblems(issue: z.core.$ZodIssue, raw: unknown): PricingProblem[] {
  const path = issue.path.map(String);
  if (issue.code === "unrecognized_keys") {
    return issue.keys.map((key) =>
      problem("unknownField", [...path, key], raw, "is not a field that is known here"),
    );
  }
  if (issue.code === "invalid_union" && issue.errors.length > 0) {
    const closest = closestBranch(issue.errors);
    return closest.flatMap((inner) => issueProblems({ ...inner, path: [...issue.path, ...inner.path] }, raw));
  }
  const value = valueAt(raw, path);
  if (issue.code === "invalid_type" || issue.code === "invalid_value" || issue.code === "invalid_union") {
    const missing = value === undefined;
    const wanted = issue.code === "invalid_type" ? typeWords(issue.expected) : choiceWords(issue);
    return [
      problem(
        missing ? "missing" : "form",
        path,
        raw,
        missing ? `is missing: it must be ${wanted}` : `must be ${wanted}`,
      ),
    ];
  }
  return [problem("range", path, raw, issue.message)];
}

/** The branch of a union whose literal tags fit, else the one with the fewest issues. */
function closestBranch(errors: readonly z.core.$ZodIssue[][]): readonly z.core.$ZodIssue[] {
  const untagged = errors.filter(
    (issues) => !issues.some((issue) => issue.code === "invalid_value" && issue.path.at(-1) === "kind"),
  );
  const candidates = untagged.length > 0 ? untagged : errors;
  return [...candidates].sort((one, other) => one.length - other.length)[0] ?? [];
}

function typeWords(expected: string): string {
  const words: Record<string, string> = {
    number: "a finite number",
    string: "text",
    array: "a list",
    object: "an object",
    boolean: "true or false",
  };
  return words[expected] ?? expected;
}

function choiceWords(issue: z.core.$ZodIssue): string {
  if (issue.code === "invalid_value")
    return `one of ${issue.values.map((value) => JSON.stringify(value)).join(", ")}`;
  return "one of the known kinds";
}
