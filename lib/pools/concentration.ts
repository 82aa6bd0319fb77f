import type { NameInput } from "../pricing/request";

/** A part of a pool: its share of the notional and how many names it holds. */
export interface Share {
  readonly label: string;
  readonly notional: number;
  readonly share: number;
  readonly names: number;
}

/** What a pool adds up to. */
export interface PoolTotals {
  readonly names: number;
  readonly notional: number;
  /** Recovery weighted by notional, a decimal; null for an empty pool. */
  readonly recovery: number | null;
  /** 1 / Σ wᵢ², the number of equal names with the same concentration (inverse Herfindahl-Hirschman index). */
  readonly effectiveNames: number | null;
  readonly largestShare: number | null;
}

/** Totals of a pool's names. */
export function poolTotals(names: readonly Pick<NameInput, "notional" | "recovery">[]): PoolTotals {
  const notional = names.reduce((sum, name) => sum + name.notional, 0);
  if (notional <= 0)
    return { names: names.length, notional: 0, recovery: null, effectiveNames: null, largestShare: null };
  const squares = names.reduce((sum, name) => sum + (name.notional / notional) ** 2, 0);
  return {
    names: names.length,
    notional,
    recovery: names.reduce((sum, name) => sum + (name.notional / notional) * name.recovery, 0),
    effectiveNames: 1 / squares,
    largestShare: names.reduce((most, name) => Math.max(most, name.notional), 0) / notional,
  };
}

/** Shares of the notional by sector, largest first; names without a sector together. */
export function sectorShares(names: readonly NameInput[]): Share[] {
  return shares(names, ({ sector }) => sector || "No sector");
}

/** Shares of the notional by name, largest first. */
export function nameShares(names: readonly NameInput[]): Share[] {
  return shares(names, ({ id, name }) => name ?? id);
}

function shares(names: readonly NameInput[], labelOf: (name: NameInput) => string): Share[] {
  const total = names.reduce((sum, { notional }) => sum + notional, 0);
  const groups = new Map<string, { notional: number; names: number }>();
  for (const name of names) {
    const label = labelOf(name);
    const group = groups.get(label) ?? { notional: 0, names: 0 };
    groups.set(label, { notional: group.notional + name.notional, names: group.names + 1 });
  }
  return [...groups]
    .map(([label, group]) => ({ label, ...group, share: group.notional / total }))
    .sort((one, other) => other.notional - one.notional || one.label.localeCompare(other.label, "en"));
}
