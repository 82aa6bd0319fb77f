import type { Problem } from "../platform/errors";
import { type DealClass, type DealContent, dealContent } from "./schema";

/** A class as typed: percent of the pool, basis points of coupon, percent of upfront. */
export interface ClassText {
  readonly key: string;
  readonly id: string;
  readonly name: string;
  readonly attachment: string;
  readonly detachment: string;
  readonly running: string;
  readonly upfront: string;
}

/** A deal as typed: nothing is lost or rounded until it is read. */
export interface DealForm {
  readonly name: string;
  readonly poolId: string;
  readonly marketId: string;
  readonly maturity: string;
  readonly years: string;
  readonly rho: string;
  readonly law: DealContent["law"];
  readonly classes: readonly ClassText[];
  readonly nthToDefault: string;
  readonly notes: string;
}

/** What a form says: the content, or every problem with its path on the form. */
export type DealReading =
  | { readonly ok: true; readonly content: DealContent }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/** A typed number with comma or point; undefined when empty, null when it is none. */
export function typedNumber(text: string): number | null | undefined {
  const plain = text
    .trim()
    .replace(/[\s\u202f\u00a0%]/g, "")
    .replace(",", ".");
  if (plain === "") return undefined;
  return /^-?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}

/** The decimal meant by a number of percent or basis points, without binary crumbs. */
function scaled(value: number, by: number): number {
  return Number((value / by).toPrecision(15));
}

export function textOf(value: number | undefined, by: number): string {
  return value === undefined ? "" : String(Number((value * by).toPrecision(15)));
}

/** Reads a form; `base` keeps what the form does not show (a correlation other than flat). */
export function readDealForm(
  form: DealForm,
  scheduleKind: "even" | "standard",
  base: DealContent | null,
): DealReading {
  const problems: Problem[] = [];
  const number = (
    text: string,
    by: number,
    path: string,
    what: string,
    isNeeded: boolean,
  ): number | undefined => {
    const value = typedNumber(text);
    if (value === null)
      problems.push({
        code: "number",
        path,
        value: text,
        message: `${what} must be a number (it is "${text}").`,
      });
    if (value === undefined && isNeeded)
      problems.push({ code: "missing", path, message: `${what} is missing.` });
    return value === null || value === undefined ? undefined : scaled(value, by);
  };
  const classes: DealClass[] = form.classes.map((row, i) => {
    const at = (field: string) => `content.classes.${i}.${field}`;
    const label = row.name || `Class ${i + 1}`;
    const running = number(row.running, 10_000, at("running"), `${label}: the coupon`, false);
    const upfront = number(row.upfront, 100, at("upfront"), `${label}: the upfront`, false);
    return {
      id: row.id.trim() || row.key,
      name: row.name.trim(),
      attachment: number(row.attachment, 100, at("attachment"), `${label}: the attachment`, true) ?? 0,
      detachment: number(row.detachment, 100, at("detachment"), `${label}: the detachment`, true) ?? 1,
      ...(running === undefined ? {} : { running }),
      ...(upfront === undefined ? {} : { upfront }),
    };
  });
  const isFlat = !base || base.correlation.kind === "flat";
  const rho = isFlat ? number(form.rho, 100, "content.correlation.rho", "The correlation", true) : undefined;
  const years =
    scheduleKind === "even"
      ? number(form.years, 1, "content.years", "The maturity in years", true)
      : undefined;
  const contracts = form.nthToDefault.split(/[\s,;]+/).filter((part) => part !== "");
  const nthToDefault = contracts.map(
    (part) => number(part, 1, "content.nthToDefault", "An n-th-to-default contract", true) ?? 0,
  );
  if (problems.length > 0) return { ok: false, problems };
  const parsed = dealContent.safeParse({
    maturity: scheduleKind === "standard" ? form.maturity : null,
    years: years ?? null,
    law: form.law,
    correlation: isFlat ? { kind: "flat", rho } : base.correlation,
    classes,
    nthToDefault,
    notes: form.notes,
  });
  if (parsed.success) return { ok: true, content: parsed.data };
  return {
    ok: false,
    problems: parsed.error.issues.map((issue) => ({
      code: "invalid",
      path: `content.${issue.path.map(String).join(".")}`,
      message: `${issue.path.map(String).join(" ")}: ${issue.message}`,
    })),
  };
}

/** A saved deal as text. */
export function dealFormOf(deal: {
  name: string;
  poolId: string;
  marketId: string;
  content: DealContent;
}): DealForm {
  const { content } = deal;
  return {
    name: deal.name,
    poolId: deal.poolId,
    marketId: deal.marketId,
    maturity: content.maturity ?? "",
    years: content.years === null ? "" : String(content.years),
    rho: content.correlation.kind === "flat" ? textOf(content.correlation.rho, 100) : "",
    law: content.law,
    classes: content.classes.map((row) => ({
      key: row.id,
      id: row.id,
      name: row.name,
      attachment: textOf(row.attachment, 100),
      detachment: textOf(row.detachment, 100),
      running: textOf(row.running, 10_000),
      upfront: textOf(row.upfront, 100),
    })),
    nthToDefault: content.nthToDefault.join(", "),
    notes: content.notes,
  };
}
