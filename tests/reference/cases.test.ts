import { readdirSync } from "node:fs";
import { join } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { reportSchema } from "@/lib/pricing/report";
import { casesFolder, data } from "./support/data";
import { LargestErrors } from "./support/largestErrors";

interface ReferenceCase {
  readonly request: unknown;
  readonly note?: string;
  readonly expect: Readonly<Record<string, unknown>> & { readonly errors?: readonly string[] };
  readonly tolerance: Readonly<Record<string, number>>;
}

const errors = new LargestErrors(
  "Reference requests: difference from the independent implementation, relative above one",
);
afterAll(() => errors.print());

/** The value at a dotted path; `length` is an array's. */
function at(report: unknown, path: string): unknown {
  return path
    .split(".")
    .reduce<unknown>(
      (value, step) =>
        value === null || value === undefined ? undefined : (value as Record<string, unknown>)[step],
      report,
    );
}

function mismatch(report: unknown, path: string, wanted: unknown, tolerance: number): string | null {
  const found = at(report, path);
  if (typeof wanted === "number") {
    return typeof found === "number" && Math.abs(found - wanted) <= tolerance
      ? null
      : `${path} is ${found}, not ${wanted} within ${tolerance}`;
  }
  if (typeof wanted === "object" && wanted !== null && "min" in wanted) {
    return typeof found === "number" && found >= Number(wanted.min)
      ? null
      : `${path} is ${found}, below ${wanted.min}`;
  }
  if (typeof wanted === "object" && wanted !== null && "absentOrNull" in wanted) {
    return found === undefined || found === null ? null : `${path} is ${found}, not absent`;
  }
  return found === wanted ? null : `${path} is ${found}, not ${wanted}`;
}

// Source: an independent implementation in Python, see data/README.md; invented data.
describe("the report of a reference request is that of the independent implementation", () => {
  for (const file of readdirSync(casesFolder).sort()) {
    const reference = data<ReferenceCase>(join("cases", file));
    it(file.replace(".json", ""), () => {
      const outcome = price(reference.request);
      const { errors: refusals, ...figures } = reference.expect;
      if (refusals) {
        const paths = outcome.ok ? [] : outcome.problems.map((problem) => problem.path);
        const missing = refusals.filter(
          (refusal) => !paths.some((path) => path === refusal || path.startsWith(`${refusal}.`)),
        );
        expect(missing).toEqual([]);
        return;
      }
      expect(outcome.ok ? [] : outcome.problems).toEqual([]);
      if (!outcome.ok) return;
      expect(reportSchema.safeParse(outcome.report).error).toBeUndefined();
      const topic = file.replace(/^pub-\d+-|\.json$/g, "");
      for (const [path, wanted] of Object.entries(figures)) {
        const found = at(outcome.report, path);
        if (typeof wanted !== "number" || typeof found !== "number") continue;
        const scale = Math.max(1, Math.abs(wanted));
        const allowed = Math.max(reference.tolerance[path] ?? 1e-9, 1e-16);
        errors.note(topic, Math.abs(found - wanted) / scale, allowed / scale, `${file} ${path}`);
      }
      const wrong = Object.entries(figures).map(([path, wanted]) =>
        mismatch(outcome.report, path, wanted, reference.tolerance[path] ?? 1e-9),
      );
      expect(wrong.filter((line) => line !== null)).toEqual([]);
    });
  }
});
