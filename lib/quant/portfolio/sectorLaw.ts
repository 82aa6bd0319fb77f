import { type ConditionalFamily, mixOverFactor, withoutFactor } from "../maths/adaptiveMixture";
import { normalCdf } from "../maths/normal";
import { type AmountGrid, gridOfShares } from "./amountGrid";
import { comonotonicLaw } from "./comonotonicLaw";
import { panelBoundaries, settledFrom } from "./factorPanels";
import type { AmountLaw } from "./lossLaw";
import { LOWEST_FACTOR, oneFactorLaw } from "./oneFactorLaw";

/** Asset correlation inside a sector and across sectors, 0 ≤ between ≤ within ≤ 1. */
export interface SectorCorrelation {
  readonly within: number;
  readonly between: number;
}

/** Names grouped by sector: positions in the grid's shares. */
export type SectorGroups = readonly (readonly number[])[];

/** Names by sector, in the order in which sectors first appear; names without one share a sector of their own. */
export function sectorGroups(names: readonly { readonly sector: string | null }[]): SectorGroups {
  const bySector = new Map<string, number[]>();
  for (const [k, name] of names.entries()) {
    const key = name.sector ?? "";
    const known = bySector.get(key);
    if (known) known.push(k);
    else bySector.set(key, [k]);
  }
  return [...bySector.values()];
}

const OUTER_ACCURACY = { absolute: 1e-11, relative: 1e-7 };

/**
 * The law of amounts in the sector model: given the common factor the sectors are independent, each one a one-factor
 * pool of its own with correlation (within − between)/(1 − between); their laws are convolved and mixed. between < 1.
 */
export function sectorLaw(
  grid: AmountGrid,
  thresholds: Float64Array,
  groups: SectorGroups,
  correlation: SectorCorrelation,
  strikes: readonly number[],
): AmountLaw {
  const family = new SectorFamily(grid, thresholds, groups, correlation, strikes);
  const loading = Math.sqrt(correlation.between);
  const names = { thresholds, loadings: new Float64Array(thresholds.length).fill(loading) };
  let error = 0;
  if (loading === 0) {
    withoutFactor(family);
  } else {
    const high = settledFrom(names);
    const boundaries = panelBoundaries([...grid.sizes], names, LOWEST_FACTOR, high);
    error = mixOverFactor(family, boundaries, OUTER_ACCURACY, null).error;
    family.total[0]! += normalCdf(-high);
  }
  const amounts = Float64Array.from(family.total, (_, u) => u * grid.unit);
  return { amounts, masses: family.total, overflow: 0, error };
}

class SectorFamily implements ConditionalFamily {
  readonly probes: number;
  readonly total: Float64Array;
  private readonly panel: Float64Array;
  private current: Float64Array;
  private spare: Float64Array;
  private reach = 0;
  private readonly sectors: { grid: AmountGrid; positions: readonly number[] }[];

  constructor(
    private readonly grid: AmountGrid,
    private readonly thresholds: Float64Array,
    groups: SectorGroups,
    private readonly correlation: SectorCorrelation,
    private readonly strikes: readonly number[],
  ) {
    this.total = new Float64Array(grid.top + 1);
    this.panel = new Float64Array(grid.top + 1);
    this.current = new Float64Array(grid.top + 1);
    this.spare = new Float64Array(grid.top + 1);
    this.probes = 2 * strikes.length;
    this.sectors = groups.map((positions) => {
      const shares = positions.map((i) => grid.shares[i]!);
      return { grid: gridOfShares(grid.unit, shares), positions };
    });
  }

  evaluate(factor: number, probes: Float64Array): void {
    this.current.fill(0);
    this.current[0] = 1;
    this.reach = 0;
    for (const sector of this.sectors) this.convolve(this.sectorMasses(sector, factor), sector.grid.top);
    const { unit } = this.grid;
    for (const [i, strike] of this.strikes.entries()) {
      let above = 0;
      let below = 0;
      for (let u = this.reach; u >= 0; u--) {
        if (u * unit >= strike - 1e-12) above += this.current[u]!;
        else below += u * unit * this.current[u]!;
      }
      probes[2 * i] = below + strike * above;
      probes[2 * i + 1] = above;
    }
  }

  /** Law of one sector given the common factor. */
  private sectorMasses(
    sector: { grid: AmountGrid; positions: readonly number[] },
    factor: number,
  ): Float64Array {
    const { within, between } = this.correlation;
    const rest = Math.sqrt(1 - between);
    const shift = Math.sqrt(between) * factor;
    const thresholds = Float64Array.from(sector.positions, (i) => (this.thresholds[i]! - shift) / rest);
    const inner = (within - between) / (1 - between);
    if (inner >= 1) return onGrid(sector.grid, thresholds);
    const loadings = new Float64Array(thresholds.length).fill(Math.sqrt(inner));
    const reach = sector.grid.top * sector.grid.unit;
    const strikes = [0.25 * reach, 0.5 * reach, 0.75 * reach];
    const request = { strikes, upTo: Number.POSITIVE_INFINITY, floor: INNER_SIZE };
    return oneFactorLaw(sector.grid, { thresholds, loadings }, request).masses;
  }

  private convolve(masses: Float64Array, top: number): void {
    const { current, spare } = this;
    const reach = this.reach + top;
    spare.fill(0, 0, reach + 1);
    for (let v = 0; v <= top; v++) {
      const mass = masses[v]!;
      if (mass === 0) continue;
      for (let u = 0; u <= this.reach; u++) spare[u + v]! += mass * current[u]!;
    }
    this.current = spare;
    this.spare = current;
    this.reach = reach;
  }

  accumulate(weight: number): void {
    for (let u = 0; u <= this.reach; u++) this.panel[u]! += weight * this.current[u]!;
  }

  clearPanel(): void {
    this.panel.fill(0);
  }

  acceptPanel(): void {
    for (let u = 0; u < this.panel.length; u++) this.total[u]! += this.panel[u]!;
  }
}

/** Probes of a sector's law are held to this size: its own tail matters only as far as the pool's does. */
const INNER_SIZE = 1e-4;

/** The comonotonic law of a sector laid on the grid. */
function onGrid(grid: AmountGrid, thresholds: Float64Array): Float64Array {
  const law = comonotonicLaw([...grid.sizes], thresholds);
  const masses = new Float64Array(grid.top + 1);
  for (let k = 0; k < law.amounts.length; k++) {
    const steps = law.amounts[k]!;
    const lower = Math.min(Math.floor(steps + 1e-9), grid.top);
    const fraction = Math.max(0, steps - lower);
    masses[lower]! += law.masses[k]! * (1 - fraction);
    if (fraction > 1e-9) masses[lower + 1]! += law.masses[k]! * fraction;
  }
  return masses;
}
