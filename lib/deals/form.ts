import type { Problem } from "../platform/errors";
import { NumberReader, textOf } from "../platform/typed";
import { type CorrelationText, correlationText, readCorrelation } from "./correlationForm";
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
  readonly correlation: CorrelationText;
  readonly law: DealContent["law"];
  readonly classes: readonly ClassText[];
  readonly nthToDefault: string;
  readonly notes: string;
}

/** What a form says: the content, or every problem with its path on the form. */
export type DealReading =
  | { readonly ok: true; readonly content: DealContent }
  | { readonly ok: false; readonly problems: readonly Problem[] };

/** Reads a form; `base` keeps a correlation that only the programming interface can give. */
export function readDealForm(
  form: DealForm,
  scheduleKind: "even" | "standard",
  base: DealContent | null,
): DealReading {
  const numbers = new NumberReader();
  const { problems } = numbers;
  const number: NumberReader["read"] = (...field) => numbers.read(...field);
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
  const correlation = readCorrelation(form.correlation, form.rho, base?.correlation ?? null, numbers);
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
    correlation,
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
    correlation: correlationText(content.correlation),
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
