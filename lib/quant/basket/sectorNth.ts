import { mixOverFactor, withoutFactor } from "../maths/adaptiveMixture";
import { ConditionalProbabilities } from "../portfolio/factorNames";
import { panelBoundaries } from "../portfolio/factorPanels";
import { LOWEST_FACTOR } from "../portfolio/oneFactorLaw";
import type { SectorCorrelation, SectorGroups } from "../portfolio/sectorLaw";
import { addConvolution, type ClockPoint, CountRise, clockPoints } from "./countRise";
import { MixedProbes } from "./mixedProbes";
import { type PeriodOutcome, reachedFrom } from "./nthToDefault";

/** A period of a basket in the sector model: thresholds at its start (none at the first) and at its end. */
export interface SectorPeriod {
  readonly before: Float64Array | null;
  readonly after: Float64Array;
  readonly groups: SectorGroups;
  readonly correlation: SectorCorrelation;
}

/** The closest that a sector's names come to defaulting as one: beyond, the mixture would see steps only. */
const CLOSEST = 1 - 1e-14;
const OUTER_ACCURACY = { absolute: 1e-10, relative: 1e-7 };
const INNER_ACCURACY = { absolute: 1e-12, relative: 1e-7 };

/**
 * One period of the n-th-to-default contracts in the sector model, between < 1. Given the common factor the sectors are
 * independent: each one's counts are mixed over its own factor at the same moments of the clock and convolved across sectors, so
 * that the chances of being the n-th sum exactly to the rise of P_n.
 */
export function sectorNthPeriod(
  period: SectorPeriod,
  payoffs: readonly number[],
  most: number,
): PeriodOutcome {
  const family = new SectorNthFamily(period, payoffs, most);
  const { between } = period.correlation;
  if (between === 0) withoutFactor(family);
  else {
    const loadings = new Float64Array(payoffs.length).fill(Math.sqrt(between));
    const names = { thresholds: period.after, loadings };
    const sizes = payoffs.map(() => 1);
    const boundaries = panelBoundaries(sizes, names, LOWEST_FACTOR, -LOWEST_FACTOR);
    const likely = new Float64Array(family.probes).fill(1e-3);
    mixOverFactor(family, boundaries, OUTER_ACCURACY, likely);
  }
  return { reached: family.total.slice(0, most), paid: family.total.slice(most) };
}

/** What one sector brings, given the common factor: its counts and costs. */
interface SectorCounts {
  readonly end: Float64Array;
  readonly counts: readonly Float64Array[];
  readonly costs: readonly Float64Array[];
}

class SectorNthFamily extends MixedProbes {
  private readonly clock: readonly ClockPoint[];

  constructor(
    private readonly period: SectorPeriod,
    private readonly payoffs: readonly number[],
    private readonly most: number,
  ) {
    super(2 * most);
    this.clock = clockPoints(payoffs);
  }

  protected fill(factor: number): void {
    const { most, values } = this;
    const sectors = this.period.groups.map((positions) => this.sectorCounts(positions, factor));
    reachedFrom(
      product(
        sectors.map(({ end }) => end),
        most,
      ),
      values,
    );
    values.fill(0, most);
    for (const [c, { weight }] of this.clock.entries()) {
      const counts = sectors.map((sector) => sector.counts[c]!);
      for (const [s, sector] of sectors.entries()) {
        const others = product(
          counts.filter((_, k) => k !== s),
          most,
        );
        addConvolution(values.subarray(most), sector.costs[c]!, others, weight, most);
      }
    }
  }

  private sectorCounts(positions: readonly number[], factor: number): SectorCounts {
    const { before, after, correlation } = this.period;
    const { within, between } = correlation;
    const rest = Math.sqrt(1 - between);
    const shift = Math.sqrt(between) * factor;
    const shifted = (thresholds: Float64Array) =>
      Float64Array.from(positions, (i) => (thresholds[i]! - shift) / rest);
    const inner = Math.min(CLOSEST, (within - between) / (1 - between));
    const loadings = new Float64Array(positions.length).fill(Math.sqrt(inner));
    const payoffs = positions.map((i) => this.payoffs[i]!);
    const end = { thresholds: shifted(after), loadings };
    const start = before && { thresholds: shifted(before), loadings };
    const family = new SectorFamily(start, end, payoffs, this.most, this.clock);
    if (inner === 0) withoutFactor(family);
    else {
      const boundaries = panelBoundaries(
        payoffs.map(() => 1),
        end,
        LOWEST_FACTOR,
        -LOWEST_FACTOR,
      );
      mixOverFactor(family, boundaries, INNER_ACCURACY, new Float64Array(family.probes).fill(1e-3));
    }
    return family.split();
  }
}

class SectorFamily extends MixedProbes {
  private readonly before: ConditionalProbabilities | null;
  private readonly after: ConditionalProbabilities;
  private readonly rise: CountRise;
  private readonly none: Float64Array;

  constructor(
    before: { thresholds: Float64Array; loadings: Float64Array } | null,
    after: { thresholds: Float64Array; loadings: Float64Array },
    payoffs: readonly number[],
    private readonly most: number,
    private readonly clock: readonly ClockPoint[],
  ) {
    super(most * (1 + 2 * clock.length));
    this.before = before && new ConditionalProbabilities(before);
    this.after = new ConditionalProbabilities(after);
    this.rise = new CountRise(payoffs, most, clock);
    this.none = new Float64Array(payoffs.length);
  }

  protected fill(factor: number): void {
    const { rise, values, most } = this;
    rise.evaluate(this.before ? this.before.at(factor) : this.none, this.after.at(factor));
    const laws = [rise.end, ...rise.counts, ...rise.costs];
    for (const [i, law] of laws.entries()) values.set(law, i * most);
  }

  split(): SectorCounts {
    const { most, total, clock } = this;
    const law = (i: number) => total.slice(i * most, (i + 1) * most);
    return {
      end: law(0),
      counts: clock.map((_, c) => law(1 + c)),
      costs: clock.map((_, c) => law(1 + clock.length + c)),
    };
  }
}

/** The law of a sum of independent counts, for counts below `most`. */
function product(laws: readonly Float64Array[], most: number): Float64Array {
  let all = new Float64Array(most);
  all[0] = 1;
  for (const law of laws) {
    const next = new Float64Array(most);
    addConvolution(next, all, law, 1, most);
    all = next;
  }
  return all;
}
