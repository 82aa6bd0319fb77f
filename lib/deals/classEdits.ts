import { textOf, typedNumber } from "../platform/typed";
import type { ClassText } from "./form";

/** Two strikes this close, in percent of the pool, are one boundary. */
const TOUCHING = 1e-9;
/** The thinnest class that moving a boundary leaves, in percent of the pool. */
export const THINNEST = 0.01;

/** A boundary of the capital structure: its strike in percent of the pool, and whether something lies below and above it. */
export interface Boundary {
  readonly at: number;
  readonly below: string | null;
  readonly above: string | null;
}

type Row = ClassText;
type Rows = readonly ClassText[];

function strikes(row: Row): { readonly low: number; readonly high: number } | null {
  const low = typedNumber(row.attachment);
  const high = typedNumber(row.detachment);
  return typeof low === "number" && typeof high === "number" && low < high ? { low, high } : null;
}

const isSame = (one: number, other: number) => Math.abs(one - other) < TOUCHING;

/** Every boundary between 0 and 100 percent that a class of readable strikes has, from the bottom up. */
export function boundariesOf(rows: Rows): Boundary[] {
  const found = new Map<number, { below: string | null; above: string | null }>();
  const at = (strike: number) => {
    const known = [...found.keys()].find((key) => isSame(key, strike)) ?? strike;
    const sides = found.get(known) ?? { below: null, above: null };
    found.set(known, sides);
    return sides;
  };
  for (const row of rows) {
    const read = strikes(row);
    if (!read) continue;
    at(read.low).above = row.key;
    at(read.high).below = row.key;
  }
  return [...found]
    .map(([strike, sides]) => ({ at: strike, ...sides }))
    .sort((one, other) => one.at - other.at);
}

/** Moves a boundary, and with it both classes that touch there; it stops short of the next boundary. Strikes in percent. */
export function moveBoundary(rows: Rows, from: number, to: number): Rows {
  const others = boundariesOf(rows).filter(({ at }) => !isSame(at, from));
  const floor = Math.max(0, ...others.filter(({ at }) => at < from).map(({ at }) => at + THINNEST));
  const ceiling = Math.min(100, ...others.filter(({ at }) => at > from).map(({ at }) => at - THINNEST));
  const strike = percentText(Math.min(Math.max(to, floor), Math.max(floor, ceiling)));
  return rows.map((row) => {
    const read = strikes(row);
    if (!read) return row;
    if (isSame(read.low, from)) return { ...row, attachment: strike };
    if (isSame(read.high, from)) return { ...row, detachment: strike };
    return row;
  });
}

/** Cuts a class in two halves at its middle; the upper half is new, with the coupon of the class and no upfront. */
export function splitClass(rows: Rows, key: string, newKey: string): Rows {
  return rows.flatMap((row) => {
    const read = row.key === key ? strikes(row) : null;
    if (!read) return [row];
    const middle = percentText((read.low + read.high) / 2);
    const upper = {
      ...row,
      key: newKey,
      id: newKey,
      name: `${row.name} upper`.trim(),
      attachment: middle,
      upfront: "",
    };
    return [{ ...row, detachment: middle }, upper];
  });
}

/** The class that touches a class from above. */
export function classAbove(rows: Rows, key: string): ClassText | null {
  const read = strikesOf(rows, key);
  return read ? (rows.find((row) => isSame(strikes(row)?.low ?? Number.NaN, read.high)) ?? null) : null;
}

/** Makes one class of a class and the one that touches it from above; the lower one's name, coupon and upfront stay. */
export function mergeUp(rows: Rows, key: string): Rows {
  const above = classAbove(rows, key);
  if (!above) return rows;
  return rows
    .filter((row) => row.key !== above.key)
    .map((row) => (row.key === key ? { ...row, detachment: above.detachment } : row));
}

/** Lets a class and the one that touches it from above change places; each keeps its thickness. */
export function raiseClass(rows: Rows, key: string): Rows {
  const above = classAbove(rows, key);
  const lower = strikesOf(rows, key);
  const upper = above && strikes(above);
  if (!above || !lower || !upper) return rows;
  const middle = percentText(lower.low + (upper.high - upper.low));
  return rows.map((row) => {
    if (row.key === key) return { ...row, attachment: middle, detachment: above.detachment };
    if (row.key === above.key) return { ...row, attachment: percentText(lower.low), detachment: middle };
    return row;
  });
}

/** A new class on top of the highest one, up to the whole pool, or a first one of the lowest 3 percent. */
export function withClass(rows: Rows, key: string): Rows {
  const top = boundariesOf(rows).at(-1)?.at;
  const blank = { key, id: key, name: "", running: "", upfront: "" };
  if (rows.length > 0 && top === undefined) return [...rows, { ...blank, attachment: "", detachment: "" }];
  const isFull = top !== undefined && isSame(top, 100);
  const attachment = top === undefined ? "0" : isFull ? "" : percentText(top);
  return [...rows, { ...blank, attachment, detachment: top === undefined ? "3" : isFull ? "" : "100" }];
}

function strikesOf(rows: Rows, key: string) {
  const row = rows.find((one) => one.key === key);
  return row ? strikes(row) : null;
}

function percentText(percent: number): string {
  return textOf(Number(percent.toPrecision(12)), 1);
}
