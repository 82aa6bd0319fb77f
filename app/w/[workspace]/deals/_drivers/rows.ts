import type { NameDriver, NameDriversAnswer } from "@/lib/pricing/drivers";
import type { NameInput } from "@/lib/pricing/request";

/** A name's drivers; one figure a class in the order of the classes, undefined while not worked out. */
export interface NameRow {
  readonly id: string;
  readonly name: string;
  readonly sector: string;
  readonly notional: number;
  readonly isDefaulted: boolean;
  readonly figures: Readonly<Record<NameMeasure, readonly (number | null)[]>> | undefined;
}

/** What a name's figures are of. */
export type NameMeasure = "spread01" | "jump" | "hedge";

export function nameMeasures(
  currency: string,
): { value: NameMeasure; label: string; words: string; about: string }[] {
  return [
    {
      value: "spread01",
      label: "Spread 01",
      words: `${currency} for +1 bp`,
      about: `Change of value in ${currency} when one name's spreads widen by 1 bp.`,
    },
    {
      value: "jump",
      label: "Jump to default",
      words: `${currency} at default`,
      about: `Change of value in ${currency} when one name defaults today at its recovery, what is then paid included.`,
    },
    {
      value: "hedge",
      label: "Hedge in the name",
      words: `notional, ${currency}`,
      about: `Notional in ${currency} of protection to buy on the name alone, to the deal's maturity, that offsets its spread 01.`,
    },
  ];
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
    figures: figuresOf(known.get(id)),
  }));
}

function figuresOf(driver: NameDriver | undefined): NameRow["figures"] {
  return driver && { spread01: driver.spread01, jump: driver.jumpToDefault, hedge: driver.hedge };
}

/** A sector's drivers: spread 01s and hedges of its names summed, and the default among them that moves each class most. */
export interface SectorRow {
  readonly sector: string;
  readonly names: number;
  readonly notional: number;
  readonly figures: Readonly<Record<NameMeasure, readonly (number | null)[]>>;
}

export function sectorRows(rows: readonly NameRow[], classes: number): SectorRow[] {
  const sectors = new Map<string, NameRow[]>();
  for (const row of rows) sectors.set(row.sector, [...(sectors.get(row.sector) ?? []), row]);
  return [...sectors].map(([sector, names]) => {
    const live = names.filter(({ isDefaulted }) => !isDefaulted);
    const found = (measure: NameMeasure, i: number) =>
      live.flatMap(({ figures }) => figures?.[measure][i] ?? []);
    const each = Array.from({ length: classes }, (_, i) => i);
    return {
      sector,
      names: names.length,
      notional: names.reduce((sum, { notional }) => sum + notional, 0),
      figures: {
        spread01: each.map((i) => total(found("spread01", i))),
        jump: each.map((i) => furthest(found("jump", i))),
        hedge: each.map((i) => total(found("hedge", i))),
      },
    };
  });
}

function total(values: readonly number[]): number | null {
  return values.length > 0 ? values.reduce((sum, value) => sum + value, 0) : null;
}

function furthest(values: readonly number[]): number | null {
  return values.reduce<number | null>(
    (most, value) => (most === null || Math.abs(value) > Math.abs(most) ? value : most),
    null,
  );
}
