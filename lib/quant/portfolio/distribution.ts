import { normalCdf, normalQuantile } from "../maths/normal";
import { type AmountGrid, amountGrid, exactUnit } from "./amountGrid";
import { atomic, certainlyNothing } from "./atomicDistribution";
import { comonotonicLaw } from "./comonotonicLaw";
import type { Distribution } from "./distributionQuestions";
import { type Asked, FEWEST_FOR_MOMENTS, factorDistribution, WHOLE } from "./factorDistribution";
import type { FactorNames } from "./factorNames";
import { type LargePool, largePoolDistribution } from "./largePool";
import { oneFactorLaw } from "./oneFactorLaw";
import type { Portfolio } from "./portfolio";
import { type SectorGroups, sectorGroups, sectorLaw } from "./sectorLaw";
import { MOST_SUBSET_NAMES, subsetLaw } from "./subsetLaw";

/** Above this correlation the law is that of correlation one, to within 1e-7 of any expected loss. */
const COMONOTONIC = 1 - 1e-14;

export type { Distribution } from "./distributionQuestions";

/** Where among many strikes a law is held to its accuracy. */
const PROBED_AT = [0.02, 0.1, 0.25, 0.5, 1];

/** Which sum of default amounts is meant. */
export type AmountKind = "loss" | "recovery";

/** How names depend on each other. */
export type Dependence =
  | { readonly kind: "flat"; readonly rho: number }
  | { readonly kind: "loadings" }
  | { readonly kind: "sector"; readonly within: number; readonly between: number };

/** Lays amounts on grids and keeps the laws that were asked for. */
export class PoolLaws {
  private readonly grids = new Map<string, AmountGrid | null>();
  private readonly groups: SectorGroups;
  private readonly kept = new Map<string, Distribution>();
  private readonly minima = new Map<string, number>();
  /** Conditional laws worked out so far: the machine-independent measure of the work. */
  evaluations = 0;

  constructor(
    readonly portfolio: Portfolio,
    private readonly law:
      | { readonly kind: "finite"; readonly unit?: number | undefined }
      | { readonly kind: "largePool" },
    /** Strikes of the live sum at which a common law must be accurate. */
    private readonly strikes: Record<AmountKind, readonly number[]>,
  ) {
    this.groups = sectorGroups(portfolio.live);
  }

  /** Unit of the loss grid; null for the large pool and for laws over sets of defaults. */
  get unit(): number | null {
    if (this.law.kind === "largePool") return null;
    return this.gridOf("loss", 3)?.unit ?? null;
  }

  /** Whether the loss grid holds every amount exactly. */
  get isExact(): boolean {
    if (this.law.kind === "largePool") return true;
    const grid = this.gridOf("loss", 3);
    return grid === null || grid.isExact;
  }

  /** An imposed unit asks for the recursion: that is how moments are audited. */
  private get mayTakeMoments(): boolean {
    return this.law.kind === "finite" && this.law.unit === undefined;
  }

  /** The whole law at date j. `smooth` laws keep mean and variance; the others have no negative mass. */
  whole(kind: AmountKind, j: number, dependence: Dependence, smooth = true): Distribution {
    return this.keptLaw(`${kind} ${j} ${keyOf(dependence)} ${smooth}`, () =>
      this.make(kind, j, dependence, { strikes: this.strikes[kind], smooth, moments: this.mayTakeMoments }),
    );
  }

  /** The law at date j for questions about one strike that stands alone at this dependence, as under a base curve. */
  atStrike(kind: AmountKind, j: number, dependence: Dependence, strike: number, smooth = true): Distribution {
    return this.keptLaw(`${kind} ${j} ${keyOf(dependence)} ${smooth} ${strike}`, () =>
      this.make(kind, j, dependence, { strikes: [strike], smooth, moments: this.mayTakeMoments }),
    );
  }

  /** E[min(X, K)] at date j, only as much of the law worked out as the strike needs. */
  expectedMinimum(kind: AmountKind, j: number, dependence: Dependence, strike: number): number {
    if (strike <= 0) return 0;
    const key = `${kind} ${j} ${keyOf(dependence)} ${strike}`;
    let found = this.minima.get(key);
    if (found === undefined) {
      found = this.minimum(kind, j, dependence, strike);
      this.minima.set(key, found);
    }
    return found;
  }

  /**
   * The unit that amounts share under a dependence, null where the law needs no shared grid: lattices, sets of defaults,
   * comonotonic names, the large pool. (Few names without a lattice are enumerated under one factor, not under sectors.)
   */
  sharedUnit(dependence: Dependence): number | null {
    if (this.law.kind === "largePool" || this.portfolio.live.length === 0) return null;
    if (dependence.kind === "flat" && dependence.rho > COMONOTONIC) return null;
    if (dependence.kind === "sector" && dependence.between >= 1) return null;
    const own = this.gridOf("loss", 3);
    const grid = own ?? (dependence.kind === "sector" ? amountGrid(this.amountsOf("loss"), 3) : null);
    return grid && !grid.isExact ? grid.unit : null;
  }

  /** The same pool on a grid of this unit, with laws of its own. */
  onUnit(unit: number): PoolLaws {
    return new PoolLaws(this.portfolio, { kind: "finite", unit }, this.strikes);
  }

  /** The same pool with laws of its own, to be dropped after use: a search over correlations keeps nothing. */
  forOneDependence(): PoolLaws {
    const copy = new PoolLaws(this.portfolio, this.law, this.strikes);
    for (const [key, grid] of this.grids) copy.grids.set(key, grid);
    return copy;
  }

  /** E[min(X, K)] of the loss at date j and a correlation that will not be asked for again: nothing is kept. */
  expectedMinimumOnce(j: number, rho: number, strike: number): number {
    return strike <= 0 ? 0 : this.minimum("loss", j, { kind: "flat", rho }, strike);
  }

  /** The same for strikes in rising order, from one law at any dependence; `smooth` as for a whole law. */
  expectedMinimaOnce(
    j: number,
    dependence: Dependence,
    strikes: readonly number[],
    smooth = true,
  ): Float64Array {
    const probes = PROBED_AT.map((part) => strikes[Math.ceil(part * (strikes.length - 1))] ?? 0);
    const asked = {
      strikes: [...new Set(probes)],
      smooth,
      moments: this.mayTakeMoments,
      minimumOnly: true,
    };
    return this.make("loss", j, dependence, asked).minima(strikes);
  }

  /** Grid and factor model of the loss at date j; null where the law is not a one-factor recursion on a grid. */
  recursionAt(
    j: number,
    dependence: Dependence,
  ): { readonly grid: AmountGrid; readonly names: FactorNames } | null {
    if (this.law.kind === "largePool" || dependence.kind === "sector") return null;
    if (dependence.kind === "flat" && dependence.rho > COMONOTONIC) return null;
    const grid = this.gridOf("loss", 3);
    const isByMoments = this.mayTakeMoments && this.portfolio.live.length >= FEWEST_FOR_MOMENTS;
    if (grid === null || (isByMoments && !grid.isExact)) return null;
    return {
      grid,
      names: { thresholds: this.portfolio.thresholds[j]!, loadings: this.loadingsOf(dependence) },
    };
  }

  private keptLaw(key: string, make: () => Distribution): Distribution {
    let found = this.kept.get(key);
    if (!found) {
      found = make();
      this.kept.set(key, found);
    }
    return found;
  }

  private minimum(kind: AmountKind, j: number, dependence: Dependence, strike: number): number {
    return this.make(kind, j, dependence, {
      strikes: [strike],
      smooth: true,
      moments: this.mayTakeMoments,
      minimumOnly: true,
    }).between(0, strike);
  }

  private make(kind: AmountKind, j: number, dependence: Dependence, asked: Asked): Distribution {
    const { thresholds } = this.portfolio;
    const amounts = this.amountsOf(kind);
    const { strikes, smooth } = asked;
    if (this.law.kind === "largePool") return largePoolDistribution(this.singleClass(amounts, j, dependence));
    const at = thresholds[j]!;
    if (j === 0 || amounts.length === 0 || amounts.every((amount) => amount === 0)) return certainlyNothing();
    if (dependence.kind === "flat" && dependence.rho > COMONOTONIC)
      return atomic(comonotonicLaw(amounts, at));
    if (dependence.kind === "sector") return this.sectorDistribution(kind, dependence, at, strikes, smooth);
    const names = { thresholds: at, loadings: this.loadingsOf(dependence) };
    const grid = this.gridOf(kind, smooth ? 3 : 2);
    if (grid === null) return atomic(subsetLaw(amounts, names, strikes));
    return factorDistribution(grid, names, amounts, asked, (evaluations) => {
      this.evaluations += evaluations;
    });
  }

  private sectorDistribution(
    kind: AmountKind,
    { within, between }: { within: number; between: number },
    thresholds: Float64Array,
    strikes: readonly number[],
    smooth: boolean,
  ): Distribution {
    const amounts = this.amountsOf(kind);
    if (between >= 1) return atomic(comonotonicLaw(amounts, thresholds));
    const grid = this.gridOf(kind, smooth ? 3 : 2) ?? amountGrid(amounts, smooth ? 3 : 2);
    if (within === between) {
      const loadings = new Float64Array(amounts.length).fill(Math.sqrt(within));
      return atomic(oneFactorLaw(grid, { thresholds, loadings }, { strikes, upTo: WHOLE }));
    }
    return atomic(sectorLaw(grid, thresholds, this.groups, { within, between }, strikes));
  }

  private amountsOf(kind: AmountKind): number[] {
    return this.portfolio.live.map((name) => (kind === "loss" ? name.loss : name.recovered));
  }

  private loadingsOf(dependence: Dependence): Float64Array {
    const { live } = this.portfolio;
    if (dependence.kind === "flat") return new Float64Array(live.length).fill(Math.sqrt(dependence.rho));
    return Float64Array.from(live, (name) => name.loading ?? 0);
  }

  /** The grid of one kind of amount, or null where sets of defaults are enumerated instead. */
  private gridOf(kind: AmountKind, landingPoints: 2 | 3): AmountGrid | null {
    const key = `${kind} ${landingPoints}`;
    const known = this.grids.get(key);
    if (known !== undefined) return known;
    const amounts = this.amountsOf(kind);
    const imposed = this.law.kind === "finite" && kind === "loss" ? this.law.unit : undefined;
    const isFew = amounts.length <= MOST_SUBSET_NAMES && imposed === undefined && exactUnit(amounts) === null;
    const grid = isFew || amounts.length === 0 ? null : amountGrid(amounts, landingPoints, imposed);
    this.grids.set(key, grid);
    return grid;
  }

  /** The large pool's one class: the loss-weighted mean probability and the whole amount. */
  private singleClass(amounts: readonly number[], j: number, dependence: Dependence): LargePool {
    const { live, thresholds } = this.portfolio;
    let weight = 0;
    let weighted = 0;
    let amount = 0;
    for (const [k, name] of live.entries()) {
      weight += name.loss;
      weighted += name.loss * (j === 0 ? 0 : normalCdf(thresholds[j]![k]!));
      amount += amounts[k]!;
    }
    const probability = weight > 0 ? weighted / weight : 0;
    const correlation = dependence.kind === "flat" ? dependence.rho : 0;
    return { threshold: normalQuantile(probability), lossGivenDefault: amount, correlation };
  }
}

function keyOf(dependence: Dependence): string {
  if (dependence.kind === "flat") return `flat ${dependence.rho}`;
  if (dependence.kind === "sector") return `sector ${dependence.within} ${dependence.between}`;
  return "loadings";
}
