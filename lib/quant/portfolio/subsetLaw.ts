import { type ConditionalFamily, mixOverFactor, surveyProbes, withoutFactor } from "../maths/adaptiveMixture";
import { normalCdf } from "../maths/normal";
import { ConditionalProbabilities, type FactorNames } from "./factorNames";
import { panelBoundaries, settledFrom } from "./factorPanels";
import type { AmountLaw } from "./lossLaw";
import { LOWEST_FACTOR, MIXTURE_ACCURACY } from "./oneFactorLaw";

/** Pools of at most this many names without a lattice are valued over every set of defaults. */
export const MOST_SUBSET_NAMES = 12;

/** The 2^N sets of defaulting names, in ascending order of their amount. */
interface Subsets {
  readonly amounts: Float64Array;
  /** Bit i of a set: name i defaults. */
  readonly members: Int32Array;
}

function subsetsOf(amounts: readonly number[]): Subsets {
  const count = 1 << amounts.length;
  const sums = new Float64Array(count);
  for (let set = 1; set < count; set++) {
    const lowest = 31 - Math.clz32(set & -set);
    sums[set] = sums[set & (set - 1)]! + amounts[lowest]!;
  }
  const members = Int32Array.from({ length: count }, (_, set) => set).sort(
    (a, b) => sums[a]! - sums[b]! || a - b,
  );
  return { amounts: Float64Array.from(members, (set) => sums[set]!), members };
}

class SubsetFamily implements ConditionalFamily {
  readonly probes: number;
  readonly total: Float64Array;
  private readonly panel: Float64Array;
  private readonly bySet: Float64Array;

  constructor(
    private readonly subsets: Subsets,
    private readonly conditional: ConditionalProbabilities,
    private readonly strikes: readonly number[],
  ) {
    const count = subsets.members.length;
    this.total = new Float64Array(count);
    this.panel = new Float64Array(count);
    this.bySet = new Float64Array(count);
    this.probes = 2 * strikes.length;
  }

  evaluate(factor: number, probes: Float64Array): void {
    const probabilities = this.conditional.at(factor);
    const { bySet } = this;
    bySet[0] = 1;
    for (let i = 0; i < probabilities.length; i++) {
      const half = 1 << i;
      const probability = probabilities[i]!;
      for (let set = 0; set < half; set++) {
        bySet[set + half] = bySet[set]! * probability;
        bySet[set]! *= 1 - probability;
      }
    }
    const { amounts, members } = this.subsets;
    for (const [k, strike] of this.strikes.entries()) {
      let below = 0;
      let above = 0;
      for (let j = members.length - 1; j >= 0; j--) {
        const mass = bySet[members[j]!]!;
        if (amounts[j]! >= strike) above += mass;
        else below += amounts[j]! * mass;
      }
      probes[2 * k] = below + strike * above;
      probes[2 * k + 1] = above;
    }
  }

  accumulate(weight: number): void {
    const { members } = this.subsets;
    for (let j = 0; j < members.length; j++) this.panel[j]! += weight * this.bySet[members[j]!]!;
  }

  clearPanel(): void {
    this.panel.fill(0);
  }

  acceptPanel(): void {
    for (let j = 0; j < this.panel.length; j++) this.total[j]! += this.panel[j]!;
  }
}

/** The exact law of a few names' amounts in a one-factor copula, lattice or not: every set of defaults given the factor. */
export function subsetLaw(
  amounts: readonly number[],
  names: FactorNames,
  strikes: readonly number[],
): AmountLaw {
  const subsets = subsetsOf(amounts);
  const conditional = new ConditionalProbabilities(names);
  const family = new SubsetFamily(subsets, conditional, strikes);
  if (names.loadings.every((loading) => loading === 0)) {
    withoutFactor(family);
    return { amounts: subsets.amounts, masses: family.total, overflow: 0, error: 0 };
  }
  const high = settledFrom(names);
  const boundaries = panelBoundaries(amounts, names, LOWEST_FACTOR, high);
  const record = mixOverFactor(family, boundaries, MIXTURE_ACCURACY, surveyProbes(family, boundaries));
  family.total[0]! += normalCdf(-high);
  return { amounts: subsets.amounts, masses: family.total, overflow: 0, error: record.error };
}
