import type { ColumnUnit, DecimalMark } from "./numbers";

/** What a column can be read as. */
export const columnFields = [
  "ignore",
  "id",
  "name",
  "sector",
  "notional",
  "recovery",
  "lossGivenDefault",
  "loading",
  "spread",
  "yearly",
  "cumulative",
  "hazard",
  "upfront",
  "coupon",
  "status",
] as const;
export type ColumnField = (typeof columnFields)[number];

/** A column as it is read; `years` for spreads, cumulative probabilities and upfronts, else null. */
export interface ColumnReading {
  readonly header: string;
  readonly field: ColumnField;
  readonly unit: ColumnUnit;
  readonly years: number | null;
  /** The mark between whole and decimal part. */
  readonly mark: DecimalMark;
  /** Why a reader should look twice at how the column is read. */
  readonly remark: string | null;
}

/** What a header alone tells; the unit is null where it names none. */
export interface HeaderReading extends Pick<ColumnReading, "field" | "years"> {
  readonly unit: ColumnUnit | null;
}

export const fieldsWithYears: readonly ColumnField[] = ["spread", "cumulative", "upfront"];
export const textFields: readonly ColumnField[] = ["ignore", "id", "name", "sector", "status"];

/** Usual spellings in the trade's plain words, most telling first; compared with the header in lower case without accents. */
const spellings: readonly (readonly [ColumnField, RegExp])[] = [
  ["lossGivenDefault", /\b(lgd|loss given default|loss severity|severity|verlustquote)\b/],
  [
    "recovery",
    /\b(recovery|recoveries|rec|rr|recovery rate|erlosquote|ruckzahlungsquote|recouvrement|recupero|recuperacion)\b/,
  ],
  ["upfront", /\b(upfront|up front|points upfront|pts)\b/],
  ["coupon", /\b(coupon|running|fixed rate|kupon|cedola|cupon)\b/],
  ["cumulative", /\b(cum|cumulative|kumuliert\w*|cumule\w*)\b/],
  [
    "yearly",
    /\b(pd|default prob\w*|prob\w* of default|yearly|annual pd|ausfallwahrscheinlichkeit|probabilite de defaut)\b/,
  ],
  ["hazard", /\b(hazard|intensity|hazard rate|ausfallintensitat)\b/],
  ["loading", /\b(loading|beta|factor loading|asset loading)\b/],
  ["status", /\b(status|defaulted|in default)\b/],
  [
    "notional",
    /\b(notional|nominal|nominale|amount|exposure|size|face|par amount|betrag|nominalbetrag|nennwert|montant|nominel|importe|importo)\b/,
  ],
  [
    "sector",
    /\b(sector|industry|branch|branche|sektor|secteur|settore|industrie|industry group|sector group)\b/,
  ],
  [
    "id",
    /^(id|code|key|ref|reference|identifier|ticker|no|nr|number|isin|lei|row|position|kennung|kurzel)$|\b(entity id|name id|issuer id|obligor id|credit id)\b/,
  ],
  [
    "name",
    /\b(name|issuer|obligor|reference entity|entity|company|borrower|counterparty|credit|emittent|emetteur|emittente|\w*schuldner\w*|debiteur)\b/,
  ],
  ["spread", /\b(spread|cds|par spread|quote|bp|bps)\b/],
];

const TENOR = /(?:^|[^\d.,])(\d+(?:[.,]\d+)?)\s*(y|yr|yrs|year|years|j|jahre|a|ans|anni|m|mo|months)\b/;
const TENORS = new RegExp(TENOR.source, "g");

/** Reads a header cell: its field, the unit it names, the tenor it names. */
export function readHeader(header: string): HeaderReading {
  const plain = plainText(header);
  const years = tenorIn(plain);
  const withoutTenor = plain.replace(TENORS, " ").trim();
  const found = spellings.find(([, spelling]) => spelling.test(withoutTenor))?.[0];
  const isBareTenor = years !== null && withoutTenor.replace(/\b(bps?|pct|percent)\b|[^a-z]/g, "") === "";
  const field = refined(found ?? (isBareTenor ? "spread" : "ignore"), plain, years);
  return { field, unit: unitIn(header, field), years: yearsOf(field, years) };
}

/** The tenor a column of a field has: the one named, else the usual one; null for fields without. */
export function yearsOf(field: ColumnField, named: number | null): number | null {
  if (!fieldsWithYears.includes(field)) return null;
  return named ?? (field === "cumulative" ? 1 : 5);
}

/** A default probability over more than a year is cumulative; a spread stays one whatever stands beside it. */
function refined(field: ColumnField, plain: string, years: number | null): ColumnField {
  if (field === "yearly" && years !== null && years !== 1) return "cumulative";
  if (field === "cumulative" && /\bspread\b/.test(plain)) return "spread";
  return field;
}

function plainText(header: string): string {
  return header
    .normalize("NFD")
    .replace(/[\u0300-\u036f]/g, "")
    .replace(/([a-z])([A-Z])/g, "$1 $2")
    .toLowerCase()
    .replace(/[_\-/()[\]:;.%*#]+(?!\d)/g, " ")
    .replace(/[_/()[\]]/g, " ")
    .replace(/\s+/g, " ")
    .trim();
}

function tenorIn(plain: string): number | null {
  const match = TENOR.exec(plain);
  if (!match) return null;
  const value = Number(match[1]!.replace(",", "."));
  return match[2]!.startsWith("m") ? value / 12 : value;
}

function unitIn(header: string, field: ColumnField): ColumnUnit | null {
  if (field === "notional") {
    if (/\b(m|mn|mm|mio|million|millions|millionen)\b/i.test(header)) return "millions";
    return /\b(k|tsd|thousand|thousands|tausend)\b|'?\b000s?\b/i.test(header) ? "thousands" : null;
  }
  if (/%|\bpct\b|\bper ?cent\b|\bprozent\b/i.test(header)) return "percent";
  if (/\bdecimals?\b/i.test(header)) return "plain";
  return /\bbps?\b|\bbasis ?points\b|\bbasispunkte\b/i.test(header) ? "basisPoints" : null;
}
