import type { CreditInput } from "../../pricing/request";
import type { RowCells } from "./cells";
import type { ColumnField } from "./columns";
import { isBlank } from "./numbers";

const LONGEST_YEARS = 100;

/**
 * A row's credit input: default by its status, else the first kind of column that has a value, in the order spreads,
 * cumulative probabilities, yearly probability, hazard, upfront with coupon. Null where it is complained about.
 */
export function readCredit(cells: RowCells): CreditInput | null {
  if (/^(defaulted|default|in default|yes|true|1)$/i.test(cells.text("status"))) return { kind: "defaulted" };
  const before = cells.problems.length;
  const credit =
    readSpreads(cells) ??
    readCumulative(cells) ??
    readYearly(cells) ??
    readHazard(cells) ??
    readUpfront(cells);
  if (cells.problems.length > before) return null;
  if (credit === null) complainOfNone(cells);
  return credit;
}

interface Node {
  readonly position: number;
  readonly years: number;
  readonly value: number;
}

function nodesOf(cells: RowCells, field: "spread" | "cumulative"): Node[] {
  const nodes = cells.positions(field).flatMap((position): Node[] => {
    const value = cells.number(position);
    const years = cells.columns[position]!.years ?? 0;
    if (value === null) return [];
    if (!(years > 0 && years <= LONGEST_YEARS)) cells.complain(position, "needs a tenor of 0 to 100 years");
    return [{ position, years, value }];
  });
  return nodes.sort((one, other) => one.years - other.years);
}

function readSpreads(cells: RowCells): CreditInput | null {
  const nodes = nodesOf(cells, "spread");
  for (const [k, { position, value, years }] of nodes.entries()) {
    if (value < 0) cells.complain(position, "must not be negative");
    if (value > 1_000) cells.complain(position, "is no credible spread: check the unit");
    if (nodes[k - 1]?.years === years) cells.complain(position, `is a second spread at ${years} years`);
  }
  if (nodes.length === 0) return null;
  return { kind: "spread", nodes: nodes.map(({ years, value }) => ({ years, spread: value })) };
}

function readCumulative(cells: RowCells): CreditInput | null {
  const nodes = nodesOf(cells, "cumulative");
  for (const [k, { position, value, years }] of nodes.entries()) {
    const before = nodes[k - 1];
    if (value < 0 || value > 1) cells.complain(position, "must be a probability between 0 % and 100 %");
    else if (before && before.value > value)
      cells.complain(position, `must not be below that of ${before.years} years`);
    if (before?.years === years) cells.complain(position, `is a second probability at ${years} years`);
  }
  if (nodes.length === 0) return null;
  return { kind: "cumulative", nodes: nodes.map(({ years, value }) => ({ years, probability: value })) };
}

function readYearly(cells: RowCells): CreditInput | null {
  const [position] = cells.positions("yearly");
  const probability = position === undefined ? null : cells.number(position);
  if (probability === null) return null;
  if (probability < 0 || probability > 1)
    cells.complain(position!, "must be a probability between 0 % and 100 %");
  return { kind: "yearly", probability };
}

function readHazard(cells: RowCells): CreditInput | null {
  const [position] = cells.positions("hazard");
  const rate = position === undefined ? null : cells.number(position);
  if (rate === null) return null;
  if (rate < 0 || rate > 1_000) cells.complain(position!, "must be a hazard rate of zero or more");
  return { kind: "hazard", rate };
}

function readUpfront(cells: RowCells): CreditInput | null {
  const position = cells.positions("upfront").find((i) => !isBlank(cells.row.cells[i] ?? ""));
  const upfront = position === undefined ? null : cells.number(position);
  if (position === undefined || upfront === null) return null;
  if (upfront < -10 || upfront > 1) cells.complain(position, "must be an upfront of at most 100 %");
  const [couponPosition] = cells.positions("coupon");
  const coupon = couponPosition === undefined ? null : cells.number(couponPosition);
  if (coupon === null) {
    cells.complain(couponPosition ?? position, "is missing: an upfront needs its coupon");
    return null;
  }
  if (coupon < 0) cells.complain(couponPosition!, "must not be negative");
  if (coupon > 1_000) cells.complain(couponPosition!, "is no credible coupon: check the unit");
  return { kind: "upfront", years: cells.columns[position]!.years ?? 5, upfront, coupon };
}

const kinds: readonly ColumnField[] = ["spread", "cumulative", "yearly", "hazard", "upfront", "status"];

function complainOfNone(cells: RowCells): void {
  const position = kinds.flatMap((field) => cells.positions(field))[0];
  if (position !== undefined) cells.complain(position, "gives the name no credit input");
}
