import { marketProblems } from "./check";
import { quotesText, readQuotes } from "./quotesText";
import type { MarketContent, QuotedPool } from "./schema";

/** A market as typed: every field is text, so that nothing typed is lost while it does not fit. Rates are in percent. */
export interface MarketForm {
  readonly name: string;
  readonly pricingDate: string;
  readonly discountKind: "flat" | "zero" | "par";
  readonly rate: string;
  readonly nodes: readonly { readonly years: string; readonly rate: string }[];
  readonly scheduleKind: "even" | "standard";
  readonly perYear: string;
  /** Dates in any separation. */
  readonly holidays: string;
  readonly quotedPools: readonly QuotedPoolText[];
}

/** A quoted pool as typed: its quotes a line each, as pasted from a spreadsheet. */
export interface QuotedPoolText {
  readonly key: string;
  readonly name: string;
  readonly poolId: string;
  readonly quotes: string;
}

/** What a form says: the market, or what does not fit by field path. */
export type FormReading =
  | {
      readonly ok: true;
      readonly name: string;
      readonly pricingDate: string;
      readonly content: MarketContent;
    }
  | { readonly ok: false; readonly problems: Readonly<Record<string, string>> };

/** A new market: a flat curve still to be given, the trade's standard dates. */
export function blankForm(pricingDate: string): MarketForm {
  return {
    name: "",
    pricingDate,
    discountKind: "flat",
    rate: "",
    nodes: [{ years: "1", rate: "" }],
    scheduleKind: "standard",
    perYear: "4",
    holidays: "",
    quotedPools: [],
  };
}

/** A saved market as a form. */
export function formOf(market: {
  readonly name: string;
  readonly pricingDate: string;
  readonly content: MarketContent;
}): MarketForm {
  const { discount, schedule } = market.content;
  const blank = blankForm(market.pricingDate);
  return {
    ...blank,
    name: market.name,
    discountKind: discount.kind,
    ...(discount.kind === "flat"
      ? { rate: percentText(discount.rate) }
      : {
          nodes: discount.nodes.map(({ years, rate }) => ({ years: String(years), rate: percentText(rate) })),
        }),
    quotedPools: (market.content.quotedPools ?? []).map(({ key, name, poolId, maturities }) => ({
      key,
      name,
      poolId,
      quotes: quotesText(maturities),
    })),
    scheduleKind: schedule.kind,
    ...(schedule.kind === "even"
      ? { perYear: String(schedule.perYear) }
      : { holidays: schedule.holidays.join("\n") }),
  };
}

/** Fields that only make sense together: who changes one of them decides on all. */
const groups: readonly (readonly (keyof MarketForm)[])[] = [
  ["name"],
  ["pricingDate"],
  ["discountKind", "rate", "nodes"],
  ["scheduleKind", "perYear", "holidays"],
  ["quotedPools"],
];

/** My changes since `base`, laid over their newer version: what I left alone is theirs. */
export function mergedForm(base: MarketForm, mine: MarketForm, theirs: MarketForm): MarketForm {
  const isMine = (fields: readonly (keyof MarketForm)[]) =>
    fields.some((field) => JSON.stringify(mine[field]) !== JSON.stringify(base[field]));
  const parts = groups
    .filter(isMine)
    .flatMap((fields) => fields.map((field): [keyof MarketForm, unknown] => [field, mine[field]]));
  return { ...theirs, ...(Object.fromEntries(parts) as Partial<MarketForm>) };
}

/** Reads a form; every problem at once, by the path of its field. */
export function readForm(form: MarketForm): FormReading {
  const problems: Record<string, string> = {};
  const name = form.name.trim();
  if (name === "") problems.name = "Give the market a name.";
  if (name.length > 120) problems.name = "A name has at most 120 characters.";
  const content: MarketContent = {
    discount: readDiscount(form, problems),
    schedule: readSchedule(form, problems),
    ...(form.quotedPools.length > 0 ? { quotedPools: readQuotedPools(form, problems) } : {}),
  };
  if (!/^\d{4}-\d{2}-\d{2}$/.test(form.pricingDate)) problems.pricingDate = "A date is written YYYY-MM-DD.";
  if (Object.keys(problems).every((path) => path === "name")) {
    for (const { path, message } of marketProblems(form.pricingDate, content)) problems[path] ??= message;
  }
  if (Object.keys(problems).length > 0) return { ok: false, problems };
  return { ok: true, name, pricingDate: form.pricingDate, content };
}

function readDiscount(form: MarketForm, problems: Record<string, string>): MarketContent["discount"] {
  const rateAt = (text: string, path: string) => numberAt(text, path, problems, -2);
  if (form.discountKind === "flat") return { kind: "flat", rate: rateAt(form.rate, "content.discount.rate") };
  if (form.nodes.length === 0) problems["content.discount.nodes"] = "Give at least one node.";
  return {
    kind: form.discountKind,
    nodes: form.nodes.map(({ years, rate }, i) => ({
      years: numberAt(years, `content.discount.nodes.${i}.years`, problems, 0),
      rate: rateAt(rate, `content.discount.nodes.${i}.rate`),
    })),
  };
}

function readQuotedPools(form: MarketForm, problems: Record<string, string>): QuotedPool[] {
  return form.quotedPools.map(({ key, name, poolId, quotes }, i) => {
    const at = `content.quotedPools.${i}`;
    if (name.trim() === "") problems[`${at}.name`] = "Give the quoted pool a name.";
    if (poolId === "") problems[`${at}.poolId`] = "Choose a pool.";
    const read = readQuotes(quotes, form.scheduleKind === "even");
    if (read.problems.length > 0)
      problems[`${at}.maturities`] = read.problems.map(({ message }) => message).join(" ");
    return { key, name: name.trim(), poolId, maturities: read.maturities };
  });
}

function readSchedule(form: MarketForm, problems: Record<string, string>): MarketContent["schedule"] {
  if (form.scheduleKind === "standard") {
    const holidays = form.holidays.split(/[\s,;]+/).filter((text) => text !== "");
    const wrong = holidays.filter((text) => !/^\d{4}-\d{2}-\d{2}$/.test(text));
    if (wrong.length > 0)
      problems["content.schedule.holidays"] =
        `Dates are written YYYY-MM-DD; these are not: ${wrong.slice(0, 5).join(", ")}${wrong.length > 5 ? " …" : ""}.`;
    return { kind: "standard", holidays };
  }
  const path = "content.schedule.perYear";
  const perYear = numberAt(form.perYear, path, problems, 0);
  if (!(path in problems) && !(Number.isInteger(perYear) && perYear >= 1 && perYear <= 12))
    problems[path] = "Payments a year are a whole number from 1 to 12.";
  return { kind: "even", perYear };
}

/** The number typed, its digits shifted by `places`, with a decimal comma or point; NaN and a problem where it is none. */
function numberAt(text: string, path: string, problems: Record<string, string>, places: number): number {
  const digits = text
    .trim()
    .replace(/\u2212/g, "-")
    .replace(/\s*%$/, "")
    .replace(",", ".");
  if (/^[+-]?(\d+\.?\d*|\.\d+)$/.test(digits)) return Number(`${digits}e${places}`);
  problems[path] = digits === "" ? "Give a number." : `"${text.trim()}" is not a number.`;
  return Number.NaN;
}

function percentText(rate: number): string {
  const [digits, exponent = "0"] = String(rate).split("e");
  return String(Number(`${digits}e${Number(exponent) + 2}`));
}
