import type { NameDriversAnswer } from "@/lib/pricing/drivers";
import type { NameInput } from "@/lib/pricing/request";

/** A name's drivers; one figure a class in the order of the classes, undefined while not worked out. */
export interface NameRow {
  readonly id: string;
  readonly name: string;
  readonly sector: string;
  readonly notional: number;
  readonly isDefaulted: boolean;
  readonly spread01: readonly (number | null)[] | undefined;
  readonly jump: readonly (number | null)[] | undefined;
}

/** The names of a pool with what is worked out of them so far. */
export function nameRows(
  pool: readonly NameInput[],
  outputs: readonly (NameDriversAnswer | undefined)[],
): NameRow[] {
  const known = new Map(
    outputs.flatMap((answer) => (answer?.ok ? answer.names.map((name) => [name.id, name] as const) : [])),
  );
  return pool.map(({ id, name, sector, notional, credit }) => ({
    id,
    name: name ?? "",
    sector: sector || "No sector",
    notional,
    isDefaulted: credit.kind === "defaulted",
    spread01: known.get(id)?.spread01,
    jump: known.get(id)?.jumpToDefault,
  }));
}

/** A sector's drivers: its names' spread 01s summed, and the default among them that moves each class most. */
export interface SectorRow {
  readonly sector: string;
  readonly names: number;
  readonly notional: number;
  readonly isWhole: boolean;
  readonly spread01: readonly (number | null)[];
  readonly jump: readonly (number | null)[];
}

export function sectorRows(rows: readonly NameRow[], classes: number): SectorRow[] {
  const sectors = new Map<string, NameRow[]>();
  for (const row of rows) sectors.set(row.sector, [...(sectors.get(row.sector) ?? []), row]);
  return [...sectors].map(([sector, names]) => {
    const live = names.filter(({ isDefaulted }) => !isDefaulted);
    const found = (i: number, pick: (row: NameRow) => readonly (number | null)[] | undefined) =>
      live.flatMap((row) => pick(row)?.[i] ?? []);
    const each = Array.from({ length: classes }, (_, i) => i);
    return {
      sector,
      names: names.length,
      notional: names.reduce((sum, { notional }) => sum + notional, 0),
      isWhole: live.every((row) => row.spread01 !== undefined),
      spread01: each.map((i) => {
        const parts = found(i, (row) => row.spread01);
        return parts.length > 0 ? parts.reduce((sum, value) => sum + value, 0) : null;
      }),
      jump: each.map((i) => furthest(found(i, (row) => row.jump))),
    };
  });
}

function furthest(values: readonly number[]): number | null {
  return values.reduce<number | null>(
    (most, value) => (most === null || Math.abs(value) > Math.abs(most) ? value : most),
    null,
  );
}
