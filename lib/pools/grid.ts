import type { CreditInput, NameInput } from "../pricing/request";
import { type ColumnField, type ColumnReading, fieldsWithYears } from "./import/columns";
import { type ColumnUnit, digitsIn } from "./import/numbers";

/** A column of the names grid: read by the same rules as a column of a file, with a stable key. */
export interface GridColumn extends ColumnReading {
  readonly key: string;
}

/** A kind of credit column that can be shown; `years` where the kind has a tenor. */
export interface CreditColumn {
  readonly field: ColumnField;
  readonly years: number | null;
}

const unitOf: Partial<Record<ColumnField, ColumnUnit>> = {
  recovery: "percent",
  spread: "basisPoints",
  yearly: "percent",
  cumulative: "percent",
  hazard: "percent",
  upfront: "percent",
  coupon: "basisPoints",
};

const titles: Partial<Record<ColumnField, string>> = {
  id: "Id",
  name: "Name",
  sector: "Sector",
  notional: "Notional",
  recovery: "Recovery",
  loading: "Loading",
  spread: "Spread",
  yearly: "Yearly default probability",
  cumulative: "Default probability to",
  hazard: "Hazard rate",
  upfront: "Upfront",
  coupon: "Coupon",
  status: "Status",
};

const suffix: Partial<Record<ColumnUnit, string>> = { percent: " (%)", basisPoints: " (bp)" };

/** The columns that show every input of the names, and the further credit columns asked for. */
export function gridColumns(
  names: readonly NameInput[],
  currency: string,
  further: readonly CreditColumn[] = [],
): GridColumn[] {
  const shown = [...creditColumns(names), ...further];
  if (!shown.some(({ field }) => field !== "status")) shown.unshift({ field: "spread", years: 5 });
  const credit = uniqueColumns(shown);
  const columns: CreditColumn[] = (["id", "name", "sector", "notional", "recovery"] as const).map(
    (field) => ({
      field,
      years: null,
    }),
  );
  if (names.some(({ loading }) => loading !== undefined)) columns.push({ field: "loading", years: null });
  return [...columns, ...credit].map((column) => gridColumn(column, currency));
}

function gridColumn({ field, years }: CreditColumn, currency: string): GridColumn {
  const unit = unitOf[field] ?? "plain";
  const money = field === "notional" ? ` (${currency})` : "";
  const header = `${titles[field]}${years === null ? "" : ` ${years}Y`}${money}${suffix[unit] ?? ""}`;
  return { key: `${field} ${years ?? ""}`.trim(), header, field, unit, years, mark: ".", remark: null };
}

const order: readonly ColumnField[] = [
  "spread",
  "cumulative",
  "yearly",
  "hazard",
  "upfront",
  "coupon",
  "status",
];

function uniqueColumns(columns: readonly CreditColumn[]): CreditColumn[] {
  const withCoupon = columns.some(({ field }) => field === "upfront")
    ? [...columns, { field: "coupon" as const, years: null }]
    : columns;
  const unique = new Map(withCoupon.map((column) => [`${column.field} ${column.years}`, column]));
  return [...unique.values()].sort(
    (one, other) =>
      order.indexOf(one.field) - order.indexOf(other.field) || (one.years ?? 0) - (other.years ?? 0),
  );
}

function creditColumns(names: readonly NameInput[]): CreditColumn[] {
  return names.flatMap(({ credit }): CreditColumn[] => {
    if (credit.kind === "defaulted") return [{ field: "status", years: null }];
    if (credit.kind === "upfront") return [{ field: "upfront", years: credit.years }];
    if (!fieldsWithYears.includes(credit.kind)) return [{ field: credit.kind, years: null }];
    return "nodes" in credit
      ? credit.nodes.map(({ years }) => ({ field: credit.kind as ColumnField, years }))
      : [];
  });
}

/** A name's value in a column: text, or a decimal; null where it has none. */
export function valueIn(name: NameInput, { field, years }: CreditColumn): string | number | null {
  switch (field) {
    case "id":
    case "name":
    case "sector":
    case "notional":
    case "recovery":
    case "loading":
      return name[field] ?? null;
    default:
      return creditValue(name.credit, field, years);
  }
}

function creditValue(credit: CreditInput, field: ColumnField, years: number | null): string | number | null {
  if (field === "status") return credit.kind === "defaulted" ? "defaulted" : null;
  if (credit.kind === "upfront") {
    if (field === "coupon") return credit.coupon;
    return field === "upfront" && credit.years === years ? credit.upfront : null;
  }
  if (credit.kind !== field) return null;
  if (credit.kind === "yearly") return credit.probability;
  if (credit.kind === "hazard") return credit.rate;
  if (credit.kind === "spread") return credit.nodes.find((node) => node.years === years)?.spread ?? null;
  if (credit.kind === "cumulative")
    return credit.nodes.find((node) => node.years === years)?.probability ?? null;
  return null;
}

/** A value as the text of its cell, in the column's unit, all digits. */
export function cellText(value: string | number | null, unit: ColumnUnit): string {
  if (value === null) return "";
  return typeof value === "string" ? value : digitsIn(value, unit);
}
