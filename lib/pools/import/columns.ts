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
] as const;
export type ColumnField = (typeof columnFields)[number];

/** How the numbers of a column are scaled. */
export const columnUnits = ["plain", "percent", "basisPoints"] as const;
export type ColumnUnit = (typeof columnUnits)[number];

/** A column as it was read; `years` for spreads and cumulative probabilities, and for an upfront's tenor. */
export interface ColumnReading {
  readonly header: string;
  readonly field: ColumnField;
  readonly unit: ColumnUnit;
  readonly years: number | null;
}

export const fieldsWithYears: readonly ColumnField[] = ["spread", "cumulative", "upfront"];
export const textFields: readonly ColumnField[] = ["ignore", "id", "name", "sector"];

/** Usual spellings, most telling first; compared with the header in lower case without marks. */
const spellings: readonly (readonly [ColumnField, RegExp])[] = [
  ["lossGivenDefault", /\b(lgd|loss given default|loss severity|severity)\b/],
  ["recovery", /\b(recovery|recoveries|rec|rr|recup|erlosquote|recovery rate)\b/],
  ["upfront", /\b(upfront|up front|points upfront|pts)\b/],
  ["coupon", /\b(coupon|running|fixed rate|kupon)\b/],
  ["cumulative", /\b(cum|cumulative|kumuliert\w*)\b/],
  [
    "yearly",
    /\b(pd|default prob\w*|prob\w* of default|yearly|annual pd|ausfallwahrscheinlichkeit|probabilite de defaut)\b/,
  ],
  ["hazard", /\b(hazard|intensity|hazard rate)\b/],
  ["loading", /\b(loading|beta|factor loading|asset loading)\b/],
  [
    "notional",
    /\b(notional|nominal|amount|exposure|size|face|par amount|betrag|nennwert|montant|position)\b/,
  ],
  ["sector", /\b(sector|industry|branch|branche|sektor|secteur|group)\b/],
  [
    "id",
    /^(id|code|key|ref|reference|identifier|ticker|no|nr|number|isin|lei|row)$|\b(entity id|name id|issuer id|obligor id|credit id)\b/,
  ],
  [
    "name",
    /\b(name|issuer|obligor|reference entity|entity|company|borrower|counterparty|credit|emittent|emetteur|\w*schuldner\w*)\b/,
  ],
  ["spread", /\b(spread|cds|par spread|quote|bp|bps)\b/],
];

/** Reads a header cell: its field, the unit it names, the tenor it names. */
export function readHeader(header: string): ColumnReading {
  const plain = plainText(header);
  const years = tenorIn(plain);
  const withoutTenor = plain
    .replace(/\b\d+([.,]\d+)?\s*(y|yr|yrs|year|years|j|jahre|a|ans|m|mo|months)\b/g, " ")
    .trim();
  const found = spellings.find(([, spelling]) => spelling.test(withoutTenor))?.[0];
  const isBareTenor = years !== null && withoutTenor.replace(/[^a-z]/g, "") === "";
  const field = refined(found ?? (isBareTenor ? "spread" : "ignore"), plain, years);
  return {
    header,
    field,
    unit: unitIn(header),
    years: fieldsWithYears.includes(field) ? (years ?? defaultYears(field)) : null,
  };
}

/** A default probability over more than a year is cumulative. */
function refined(field: ColumnField, plain: string, years: number | null): ColumnField {
  if (field === "yearly" && years !== null && years !== 1) return "cumulative";
  if (field === "cumulative" && /\bspread\b/.test(plain)) return "spread";
  return field;
}

function defaultYears(field: ColumnField): number | null {
  return field === "spread" || field === "upfront" ? 5 : 1;
}

function plainText(header: string): string {
  return header
    .normalize("NFD")
    .replace(/[̀-ͯ]/g, "")
    .toLowerCase()
    .replace(/[_\-/()[\]:;]+/g, " ")
    .replace(/\s+/g, " ")
    .trim();
}

function tenorIn(plain: string): number | null {
  const match = /(?:^|[^\d.,])(\d+(?:[.,]\d+)?)\s*(y|yr|yrs|year|years|j|jahre|a|ans|m|mo|months)\b/.exec(
    plain,
  );
  if (!match) return null;
  const value = Number(match[1]!.replace(",", "."));
  return match[2]!.startsWith("m") ? value / 12 : value;
}

function unitIn(header: string): ColumnUnit {
  if (/%|\bpct\b|\bpercent\b/i.test(header)) return "percent";
  if (/\bbps?\b|\bbasis points\b/i.test(header)) return "basisPoints";
  return "plain";
}
