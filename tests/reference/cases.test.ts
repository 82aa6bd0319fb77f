import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import { reportSchema } from "@/lib/pricing/report";

interface ReferenceCase {
  readonly request: unknown;
  readonly note?: string;
  readonly expect: Readonly<Record<string, unknown>> & { readonly errors?: readonly string[] };
  readonly tolerance: Readonly<Record<string, number>>;
}

const folder = join(process.cwd(), "tests", "reference", "data", "cases");

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
  return found === wanted ? null : `${path} is ${found}, not ${wanted}`;
}

// Source: an independent implementation in Python, see data/README.md; invented data.
describe("the report of a reference request is that of the independent implementation", () => {
  for (const file of readdirSync(folder).sort()) {
    const reference = JSON.parse(readFileSync(join(folder, file), "utf8")) as ReferenceCase;
    it(file.replace(".json", ""), () => {
      const outcome = price(reference.request);
      const { errors, ...figures } = reference.expect;
      if (errors) {
        const paths = outcome.ok ? [] : outcome.problems.map((problem) => problem.path);
        const missing = errors.filter(
          (error) => !paths.some((path) => path === error || path.startsWith(`${error}.`)),
        );
        expect(missing).toEqual([]);
        return;
      }
      expect(outcome.ok ? [] : outcome.problems).toEqual([]);
      if (!outcome.ok) return;
      expect(reportSchema.safeParse(outcome.report).error).toBeUndefined();
      const wrong = Object.entries(figures).map(([path, wanted]) =>
        mismatch(outcome.report, path, wanted, reference.tolerance[path] ?? 1e-9),
      );
      expect(wrong.filter((line) => line !== null)).toEqual([]);
    });
  }
});
