import { canonicalJson } from "../pricing/canonical";
import type { NameInput, PricingRequest } from "../pricing/request";

/** One thing that two requests do not have in common; absent sides are null. Values are the request's own, decimals. */
export interface InputDifference {
  readonly part: "Names" | "Discount" | "Correlation" | "Structure" | "Contracts" | "Time" | "Other";
  readonly what: string;
  readonly before: unknown;
  readonly after: unknown;
}

const parts = [
  ["Time", "pricingDate", "Pricing date"],
  ["Time", "schedule", "Schedule"],
  ["Discount", "discount", "Discount curve"],
  ["Correlation", "correlation", "Correlation"],
  ["Correlation", "law", "Loss law"],
  ["Contracts", "nthToDefault", "n-th-to-default contracts"],
  ["Other", "currency", "Currency"],
  ["Other", "include", "Extras asked for"],
] as const;

/** Everything in which two requests differ, names and classes one by one. */
export function inputDifferences(before: PricingRequest, after: PricingRequest): InputDifference[] {
  const plain = parts.flatMap(([part, key, what]): InputDifference[] =>
    isSame(before[key], after[key])
      ? []
      : [{ part, what, before: before[key] ?? null, after: after[key] ?? null }],
  );
  return [
    ...rowDifferences("Names", before.pool, after.pool, nameFields, ({ id, name }) => name || id),
    ...plain,
    ...rowDifferences("Structure", before.tranches, after.tranches, trancheFields, ({ id }) => id),
  ];
}

const nameFields = [
  "name",
  "sector",
  "notional",
  "recovery",
  "loading",
  "credit",
] as const satisfies (keyof NameInput)[];
const trancheFields = ["attachment", "detachment", "running", "upfront", "recoveryPaydown"] as const;

function rowDifferences<Row extends { readonly id: string }>(
  part: InputDifference["part"],
  before: readonly Row[],
  after: readonly Row[],
  fields: readonly (keyof Row & string)[],
  labelOf: (row: Row) => string,
): InputDifference[] {
  const earlier = new Map(before.map((row) => [row.id, row]));
  const later = new Set(after.map((row) => row.id));
  const gone = before
    .filter((row) => !later.has(row.id))
    .map((row) => ({ part, what: `${labelOf(row)}, taken out`, before: row, after: null }));
  const rest = after.flatMap((row): InputDifference[] => {
    const was = earlier.get(row.id);
    if (!was) return [{ part, what: `${labelOf(row)}, put in`, before: null, after: row }];
    return fields
      .filter((field) => !isSame(was[field], row[field]))
      .map((field) => ({
        part,
        what: `${labelOf(row)}, ${field}`,
        before: was[field] ?? null,
        after: row[field] ?? null,
      }));
  });
  return [...gone, ...rest];
}

function isSame(one: unknown, other: unknown): boolean {
  return canonicalJson(one ?? null) === canonicalJson(other ?? null);
}
