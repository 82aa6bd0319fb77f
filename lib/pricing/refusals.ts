import { z } from "zod";
import { parseDay } from "../quant/market/calendar";
import type { PricingProblem } from "./problem";
import { LIMITS, type PricingRequest, requestSchema } from "./request";

/** Strikes closer than this are one strike to double precision. */
const NARROWEST_TRANCHE = 1e-9;

/** A request that passed every check of form and sense, or all its problems at once. */
export type Checked =
  | { readonly ok: true; readonly request: PricingRequest }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/** Checks a request of unknown origin: form, ranges, and what fields say to each other. All problems at once. */
export function checkRequest(raw: unknown): Checked {
  const parsed = requestSchema.safeParse(raw);
  const problems = parsed.success ? [] : problemsOf(parsed.error, raw);
  problems.push(...senseProblems(raw));
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

function dateProblems(request: Loose, raw: unknown): PricingProblem[] {
  const problems: PricingProblem[] = [];
  const schedule = asObject(request.schedule);
  const pricing = typeof request.pricingDate === "string" ? parseDay(request.pricingDate) : null;
  if (request.pricingDate !== undefined && pricing === null) {
    problems.push(
      problem("date", ["pricingDate"], raw, "is not a date that exists (YYYY-MM-DD, 1900 to 2199)"),
    );
  }
  if (schedule.kind === "even") {
    const { years, perYear } = schedule;
    if (isNumber(years) && isNumber(perYear)) {
      const payments = years * perYear;
      if (Math.abs(payments - Math.round(payments)) > 1e-9 || Math.round(payments) < 1) {
        problems.push(
          problem(
            "schedule",
            ["schedule", "years"],
            raw,
            "times the payments a year must be a whole number of payments",
          ),
        );
      } else if (payments > LIMITS.payments) {
        problems.push(
          problem("limit", ["schedule", "years"], raw, `makes more than ${LIMITS.payments} payments`),
        );
      }
    }
  }
  if (schedule.kind === "standard") {
    if (request.pricingDate === undefined) {
      problems.push(problem("missing", ["pricingDate"], raw, "is missing: a standard schedule needs it"));
    }
    problems.push(...maturityProblems(schedule, pricing, raw));
    for (const [i, holiday] of asArray(schedule.holidays).entries()) {
      if (typeof holiday === "string" && parseDay(holiday) === null) {
        problems.push(
          problem("date", ["schedule", "holidays", String(i)], raw, "is not a date that exists (YYYY-MM-DD)"),
        );
      }
    }
  }
  return problems;
}

function maturityProblems(schedule: Loose, pricing: number | null, raw: unknown): PricingProblem[] {
  if (typeof schedule.maturity !== "string") return [];
  const path = ["schedule", "maturity"];
  const maturity = parseDay(schedule.maturity);
  if (maturity === null)
    return [problem("date", path, raw, "is not a date that exists (YYYY-MM-DD, 1900 to 2199)")];
  const problems: PricingProblem[] = [];
  if (!/-(06|12)-20$/.test(schedule.maturity))
    problems.push(problem("date", path, raw, "must be a 20 June or a 20 December"));
  if (pricing !== null && maturity <= pricing)
    problems.push(problem("date", path, raw, "must be after the pricing date"));
  if (pricing !== null && maturity - pricing > LIMITS.years * 366) {
    problems.push(problem("limit", path, raw, `must be within ${LIMITS.years} years of the pricing date`));
  }
  return problems;
}

function discountProblems(discount: Loose, schedule: Loose, raw: unknown): PricingProblem[] {
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

/** Nodes must come in rising order of one field. */
function orderProblems(
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

function poolProblems(pool: readonly unknown[], path: readonly string[], raw: unknown): PricingProblem[] {
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

function correlationProblems(request: Loose, raw: unknown): PricingProblem[] {
  const correlation = asObject(request.correlation);
  const pool = asArray(request.pool);
  const problems: PricingProblem[] = [];
  if (correlation.kind === "sector") {
    const { within, between } = correlation;
    if (isNumber(within) && isNumber(between) && between > within) {
      problems.push(
        problem(
          "correlation",
          ["correlation", "between"],
          raw,
          "must not be above the correlation within a sector",
        ),
      );
    }
    for (const [i, row] of pool.entries()) {
      const { sector } = asObject(row);
      if (sector === undefined || sector === "")
        problems.push(
          problem("missing", ["pool", String(i), "sector"], raw, "is missing: a sector correlation needs it"),
        );
    }
  }
  if (correlation.kind === "loadings") {
    for (const [i, row] of pool.entries()) {
      if (asObject(row).loading === undefined)
        problems.push(
          problem(
            "missing",
            ["pool", String(i), "loading"],
            raw,
            "is missing: a correlation by loadings needs it",
          ),
        );
    }
  }
  if (
    asObject(request.law).kind === "largePool" &&
    (correlation.kind === "loadings" || correlation.kind === "sector")
  ) {
    problems.push(
      problem(
        "law",
        ["law", "kind"],
        raw,
        "the large pool is one class of names: it needs a flat or a base correlation",
      ),
    );
  }
  if (correlation.kind === "base") problems.push(...baseProblems(correlation, raw));
  return problems;
}

function baseProblems(correlation: Loose, raw: unknown): PricingProblem[] {
  const problems = orderProblems(asArray(correlation.nodes), "strike", ["correlation", "nodes"], raw);
  for (const [i, node] of asArray(correlation.nodes).entries()) {
    if (asObject(node).strike === 0)
      problems.push(problem("range", ["correlation", "nodes", String(i), "strike"], raw, "must be above 0"));
  }
  const quotes = asArray(correlation.quotes);
  for (const [i, quote] of quotes.entries()) {
    const { attachment, detachment } = asObject(quote);
    const path = ["correlation", "quotes", String(i)];
    if (!isNumber(attachment) || !isNumber(detachment)) continue;
    if (detachment - attachment < NARROWEST_TRANCHE)
      problems.push(problem("strikes", path, raw, "must attach below where it detaches"));
    const before = asObject(quotes[i - 1]).detachment;
    const expected = i === 0 ? 0 : before;
    if (isNumber(expected) && Math.abs(attachment - expected) > 1e-12) {
      const words =
        attachment < expected
          ? "overlaps the quote below it"
          : "leaves a gap below it: quotes must follow each other from 0";
      problems.push(problem("quotes", [...path, "attachment"], raw, words));
    }
  }
  problems.push(
    ...poolProblems(asArray(asObject(correlation.index).pool), ["correlation", "index", "pool"], raw),
  );
  return problems;
}

function trancheProblems(tranches: readonly unknown[], raw: unknown): PricingProblem[] {
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

function contractProblems(request: Loose, raw: unknown): PricingProblem[] {
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

type Loose = Readonly<Record<string, unknown>>;

function asObject(value: unknown): Loose {
  return typeof value === "object" && value !== null && !Array.isArray(value) ? (value as Loose) : {};
}

function asArray(value: unknown): readonly unknown[] {
  return Array.isArray(value) ? value : [];
}

function isNumber(value: unknown): value is number {
  return typeof value === "number" && Number.isFinite(value);
}

function valueAt(raw: unknown, path: readonly string[]): unknown {
  let value = raw;
  for (const step of path)
    value =
      typeof value === "object" && value !== null ? (value as Record<string, unknown>)[step] : undefined;
  return value;
}

/** A problem whose words name the row's id, the field and the value. */
function problem(code: string, path: readonly string[], raw: unknown, words: string): PricingProblem {
  const value = valueAt(raw, path);
  return {
    code,
    path: path.join("."),
    ...(isPlain(value) ? { value } : {}),
    message: sentence(path, raw, value, words),
  };
}

function isPlain(value: unknown): boolean {
  return ["string", "number", "boolean"].includes(typeof value) || value === null;
}

function sentence(path: readonly string[], raw: unknown, value: unknown, words: string): string {
  const subject = subjectOf(path, raw);
  const shown = isPlain(value)
    ? ` (it is ${typeof value === "string" ? `"${value.slice(0, 60)}"` : String(value)})`
    : "";
  return `${subject} ${words}${shown}.`;
}

const rowWords: Record<string, string> = {
  pool: "Name",
  tranches: "Tranche",
  quotes: "Quote",
  nodes: "node",
  holidays: "holiday",
  nthToDefault: "Contract",
};

function subjectOf(path: readonly string[], raw: unknown): string {
  const parts: string[] = [];
  for (let i = 0; i < path.length; i++) {
    const step = path[i]!;
    const next = path[i + 1];
    const rows = rowWords[step];
    if (rows && next !== undefined && /^\d+$/.test(next)) {
      const { id } = asObject(valueAt(raw, path.slice(0, i + 2)));
      parts.push(
        typeof id === "string" && id !== ""
          ? `${rows} ${id.slice(0, 60)} (row ${Number(next) + 1})`
          : `${rows} ${Number(next) + 1}`,
      );
      i++;
    } else parts.push(step);
  }
  const text = parts.join(", ") || "The request";
  return text.charAt(0).toUpperCase() + text.slice(1);
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
