import type { ClassText } from "../deals/form";
import type { Problem } from "../platform/errors";
import { scaled, textOf, typedNumber } from "../platform/typed";
import type { LimitKind, SizedClass, SizingTarget } from "../pricing/sizing";

/** A class to be sized, as typed: limits in percent and basis points. */
export interface TargetText {
  readonly key: string;
  readonly name: string;
  readonly expectedLoss: string;
  readonly hitProbability: string;
  readonly parSpread: string;
}

/** What is to be sized, as typed: the classes from the top, and the one that takes what is left below them. */
export interface SizingForm {
  readonly rows: readonly TargetText[];
  readonly rest: { readonly key: string; readonly name: string };
  readonly top: string;
  readonly step: string;
}

export const limitFields: readonly {
  kind: LimitKind;
  label: string;
  noun: string;
  unit: string;
  by: number;
}[] = [
  {
    kind: "expectedLoss",
    label: "Expected loss at most",
    noun: "expected loss",
    unit: "% of class",
    by: 100,
  },
  {
    kind: "hitProbability",
    label: "Hit probability at most",
    noun: "hit probability",
    unit: "%",
    by: 100,
  },
  { kind: "parSpread", label: "Par spread at most", noun: "par spread", unit: "bp", by: 10_000 },
];

export type SizingReading =
  | {
      readonly ok: true;
      readonly top: number;
      readonly step: number;
      readonly targets: readonly SizingTarget[];
    }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/** The form that a deal's own classes suggest: the same names from the top, the lowest takes what is left. */
export function sizingFormOf(classes: readonly ClassText[]): SizingForm {
  const strike = (text: string) => {
    const value = typedNumber(text);
    return typeof value === "number" ? value : 0;
  };
  const ordered = [...classes].sort((one, other) => strike(other.attachment) - strike(one.attachment));
  const rows = ordered.slice(0, -1).map(({ key, name }) => blankTarget(key, name));
  const lowest = ordered.at(-1);
  return {
    rows,
    rest: { key: lowest?.key ?? "rest", name: lowest?.name ?? "First loss" },
    top: ordered[0]?.detachment || "100",
    step: "0.01",
  };
}

export function blankTarget(key: string, name: string): TargetText {
  return { key, name, expectedLoss: "", hitProbability: "", parSpread: "" };
}

/** Reads what is to be sized; every fault at once, with its field. */
export function readSizing(form: SizingForm): SizingReading {
  const problems: Problem[] = [];
  const number = (text: string, by: number, path: string, what: string) => {
    const value = typedNumber(text);
    if (value === null || (value !== undefined && value < 0))
      problems.push({
        code: "number",
        path,
        value: text,
        message: `${what} must be a number of 0 or more (it is "${text}").`,
      });
    return typeof value === "number" ? scaled(value, by) : undefined;
  };
  const top = number(form.top, 100, "top", "The highest detachment") ?? 1;
  const step = number(form.step, 100, "step", "The rounding of boundaries") ?? 0.0001;
  if (top > 1 || top <= 0)
    problems.push({
      code: "top",
      path: "top",
      message: "The highest detachment lies above 0 and up to 100 %.",
    });
  if (step < 1e-6 || step > 0.1)
    problems.push({
      code: "step",
      path: "step",
      message: "Boundaries are rounded to a step from 0.0001 to 10 %.",
    });
  const targets = form.rows.map((row, i) => {
    const limits: Partial<Record<LimitKind, number>> = {};
    for (const { kind, label, by } of limitFields) {
      const most = number(
        row[kind],
        by,
        `rows.${i}.${kind}`,
        `${row.name || "A class"}, ${label.toLowerCase()}`,
      );
      if (most !== undefined) limits[kind] = most;
    }
    if (row.name.trim() === "")
      problems.push({ code: "name", path: `rows.${i}.name`, message: "Give the class a name." });
    return { id: row.key, limits };
  });
  return problems.length > 0 ? { ok: false, problems } : { ok: true, top, step, targets };
}

/** Whether any limit is typed at all. */
export function hasLimits({ rows }: SizingForm): boolean {
  return rows.some((row) => limitFields.some(({ kind }) => row[kind].trim() !== ""));
}

/**
 * The structure that a sizing gave, from the bottom up, as a deal's classes: a class that the deal has keeps its coupon and
 * upfront. Null while a class could not be placed.
 */
export function placedClasses(
  form: SizingForm,
  sized: readonly SizedClass[],
  left: number,
  own: readonly ClassText[],
): ClassText[] | null {
  const classOf = (key: string, name: string, attachment: number, detachment: number): ClassText => {
    const known = own.find((row) => row.key === key);
    const strikes = { attachment: textOf(attachment, 100), detachment: textOf(detachment, 100) };
    return known
      ? { ...known, name, ...strikes }
      : { key, id: key, name, running: "", upfront: "", ...strikes };
  };
  const placed: ClassText[] = [];
  for (const { key, name } of form.rows) {
    const found = sized.find(({ id }) => id === key);
    if (!found?.ok) return null;
    placed.unshift(classOf(key, name.trim(), found.attachment, found.detachment));
  }
  if (left > 0) placed.unshift(classOf(form.rest.key, form.rest.name.trim() || "First loss", 0, left));
  return placed;
}

/** Why a class lies where it does, or why it cannot be placed, in words. */
export function placingWords(sized: SizedClass | undefined): string {
  if (!sized) return "Not reached: a class above it cannot be placed.";
  const labelOf = (kind: LimitKind) => limitFields.find((field) => field.kind === kind)!;
  if (sized.ok)
    return sized.binding === null
      ? "No limit binds: it takes everything below its detachment."
      : `Bound by its limit on ${labelOf(sized.binding).noun}.`;
  const at = `${textOf(Number(sized.detachment.toPrecision(10)), 100)} %`;
  if (sized.reason === "noRoom") return "Impossible: the classes above leave nothing of the pool.";
  if (sized.reason === "noLimit") return "Give it a limit: without one it has no place to stop.";
  if (sized.reason === "unreadable")
    return `Impossible: the base curve cannot be read at its detachment of ${at}.`;
  const { noun, unit, by } = labelOf(sized.limit!);
  const least = Number(((sized.least ?? 0) * by).toPrecision(4));
  return `Impossible: even the thinnest class below ${at} has a ${noun} of ${least} ${unit}, more than its limit. Raise the limit, or let the classes above reach less low.`;
}
