import { normalCdf } from "../maths/normal";
import type { AmountGrid } from "./amountGrid";
import { atomic } from "./atomicDistribution";
import type { Distribution } from "./distributionQuestions";
import type { FactorNames } from "./factorNames";
import { momentLaw } from "./momentMixture";
import { oneFactorLaw } from "./oneFactorLaw";

/** Pools of fewer names, and lattices, are always laid on a grid. */
export const FEWEST_FOR_MOMENTS = 400;
/** Moments serve where their estimated error of E[min(X, K)] is below this at every strike. */
const MOMENT_ERROR = 1e-7;

/** What a distribution will be asked. */
export interface Asked {
  /** Strikes of the live sum at which it must be accurate. */
  readonly strikes: readonly number[];
  /** Keep mean and variance of amounts on the grid; else no negative mass. */
  readonly smooth: boolean;
  /** Whether a large pool may be taken by its moments where they are exact enough. */
  readonly moments: boolean;
  /** Only E[min(X, K)] at the last strike is wanted. */
  readonly minimumOnly?: boolean;
}

/** A law without a cut. */
export const WHOLE = Number.POSITIVE_INFINITY;

/** A strike this close below the largest sum is not below it: the sum was rounded. */
const SAME = 1e-11;

/**
 * The one-factor law, worked out as far as it is asked: questions up to the highest strike take a law cut there, with one atom
 * of the right mean above; a tranche up to the largest sum takes the known mean; all else takes the whole law.
 */
export function factorDistribution(
  grid: AmountGrid,
  names: FactorNames,
  amounts: readonly number[],
  { strikes, moments, minimumOnly = false }: Asked,
  count: (evaluations: number) => void,
): Distribution {
  const most = amounts.reduce((sum, amount) => sum + amount, 0);
  const inside = strikes.filter((strike) => strike > 0 && strike < most - SAME);
  const highest = Math.max(0, ...inside);
  const law = (upTo: number) => {
    const found = oneFactorLaw(grid, names, { strikes: inside, upTo, minimumOnly });
    count(found.evaluations);
    return atomic(found);
  };
  const onGrid = once(() => law(WHOLE));
  const byMoments = once(() => {
    if (!moments || grid.isExact || amounts.length < FEWEST_FOR_MOMENTS) return null;
    const found = momentLaw(Float64Array.from(amounts), names, inside, MOMENT_ERROR);
    count(found.evaluations);
    return found.error <= MOMENT_ERROR ? found.questions : null;
  });
  const whole = () => byMoments() ?? onGrid();
  const cut = once(() => byMoments() ?? (inside.length === 0 ? onGrid() : law(highest)));
  const isCovered = (strike: number) => strike <= highest;
  const isBeyond = (strike: number) => strike >= most - SAME;
  const at = (strike: number) => (isCovered(strike) ? cut() : whole());
  return {
    between: (attachment, detachment) => {
      if (isBeyond(attachment)) return 0;
      if (attachment <= 0 && isBeyond(detachment)) return mean(amounts, names) - Math.min(attachment, 0);
      if (isCovered(attachment) && (isCovered(detachment) || isBeyond(detachment)))
        return cut().between(attachment, detachment);
      return whole().between(attachment, detachment);
    },
    minima: (wanted) => {
      const covered = wanted.filter((strike) => !isBeyond(strike));
      const isCut = covered.every(isCovered);
      const values = (isCut ? cut() : whole()).minima(covered);
      const rest = covered.length < wanted.length ? mean(amounts, names) : 0;
      return Float64Array.from(wanted, (_, k) => values[k] ?? rest);
    },
    squareBetween: (attachment, detachment) =>
      (isCovered(attachment) && isCovered(detachment) ? cut() : whole()).squareBetween(
        attachment,
        detachment,
      ),
    above: (strike) => (isBeyond(strike) ? 0 : at(strike).above(strike)),
    from: (strike) => at(strike).from(strike),
    isAtom: (strike) => at(strike).isAtom(strike),
    quantile: (level) => whole().quantile(level),
    get atoms() {
      return onGrid().atoms;
    },
    get isContinuous() {
      return cut().isContinuous;
    },
    get error() {
      return cut().error;
    },
  };
}

function mean(amounts: readonly number[], { thresholds }: FactorNames): number {
  return amounts.reduce((sum, amount, i) => sum + amount * normalCdf(thresholds[i]!), 0);
}

/** A value worked out when it is first asked for. */
function once<Value>(make: () => Value): () => Value {
  let made: { readonly value: Value } | null = null;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}
