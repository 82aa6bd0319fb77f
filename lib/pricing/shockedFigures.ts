import { parSpread as namesSpread } from "../quant/market/defaultSwap";
import { defaultedName } from "../quant/market/survivalCurve";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import { parSpread } from "../quant/tranche/legs";
import { lossInside } from "../quant/tranche/lossInside";
import { bumpedName } from "./bumps";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import type { TrancheInput } from "./request";
import { withCoupons } from "./revaluation";
import type { Shock } from "./shock";
import { sellerValue, valuedTranche } from "./trancheSection";
import { type Valuation, valuationOf } from "./valuation";

const HIGHEST_CORRELATION = 0.9999;

/** What a class comes to after a shock; null where a strike cannot be read under the base curve. */
export interface ShockedClass {
  readonly id: string;
  /** To the protection seller, in currency, with what the defaults had it pay taken off. */
  readonly value: number | null;
  readonly expectedLoss: number | null;
  readonly parSpread: number | null;
}

export type ShockedFigures =
  | {
      readonly ok: true;
      readonly classes: readonly ShockedClass[];
      /** Ids of the names that the shock lets default. */
      readonly defaulted: readonly string[];
      /** A correlation met the end of its range and was held there. */
      readonly isHeld: boolean;
    }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/**
 * Values every class of a request after a shock, by full revaluation. A class without a running coupon is valued at its own
 * par spread before the shock. An index pool behind a base curve keeps its spreads; its curve moves with the correlation.
 */
export function shockedFigures(raw: unknown, shock: Shock): ShockedFigures {
  const checked = checkRequest(raw);
  if (!checked.ok) return { ok: false, problems: checked.problems };
  const problems: PricingProblem[] = [];
  const before = valuationOf(checked.request, problems);
  if (!before || problems.length > 0) return { ok: false, problems };
  const priced = withCoupons(before);
  const defaulted = defaultingNames(before, shock, problems);
  const names = shockedNames(before, shock, new Set(defaulted), problems);
  if (problems.length > 0) return { ok: false, problems };
  const { moved, isHeld } = shockedValuation(priced, shock, names, problems);
  if (!moved || problems.length > 0) return { ok: false, problems };
  const paid = moved.portfolio.realisedLoss;
  const paidBefore = before.portfolio.realisedLoss;
  return {
    ok: true,
    defaulted,
    isHeld,
    classes: priced.request.tranches.map((tranche) => shockedClass(moved, tranche, paid, paidBefore)),
  };
}

function shockedClass(
  moved: Valuation,
  tranche: TrancheInput,
  realised: number,
  realisedBefore: number,
): ShockedClass {
  const valued = valuedTranche(moved, tranche);
  if (!valued) return { id: tranche.id, value: null, expectedLoss: null, parSpread: null };
  const { notional } = moved.portfolio;
  const width = tranche.detachment - tranche.attachment;
  const value = sellerValue(valued, width * notional);
  const paid = (lossInside(realised, tranche) - lossInside(realisedBefore, tranche)) * notional;
  return {
    id: tranche.id,
    value: value === null ? null : value - paid,
    expectedLoss: valued.profile.loss[valued.profile.loss.length - 1]!,
    parSpread: parSpread(valued.legs),
  };
}

/** The names that default: those chosen, or the widest by par spread to the deal's maturity before the shock. */
function defaultingNames(
  { request, names, market }: Valuation,
  { defaults }: Shock,
  problems: PricingProblem[],
): string[] {
  if (defaults.kind === "names") {
    const known = new Set(request.pool.map(({ id }) => id));
    for (const [i, id] of defaults.ids.entries())
      if (!known.has(id))
        problems.push({
          code: "unknownName",
          path: `shock.defaults.ids.${i}`,
          value: id,
          message: `The pool has no name ${id} that could default.`,
        });
    return defaults.ids;
  }
  return names
    .filter((name) => !name.curve.defaulted)
    .map((name, i) => ({
      id: name.id,
      i,
      spread: namesSpread(market.schedule, market.discount, name.curve, name.recovery) ?? 0,
    }))
    .sort((one, other) => other.spread - one.spread || one.i - other.i)
    .slice(0, defaults.count)
    .map(({ id }) => id);
}

function shockedNames(
  { request, names, market }: Valuation,
  shock: Shock,
  defaulted: ReadonlySet<string>,
  problems: PricingProblem[],
): PortfolioName[] {
  const sectors = new Map(shock.sectors.map((row) => [row.sector, row]));
  return names.map((name, i) => {
    if (name.curve.defaulted) return name;
    const own = sectors.get(name.sector ?? "");
    const recovery = shock.recovery + (own?.recovery ?? 0);
    const scale = shock.scale * (own?.scale ?? 1);
    const isMoved = scale !== 1 || shock.shift !== 0 || recovery !== 0;
    if (name.recovery + recovery < 0 || name.recovery + recovery >= 1) {
      problems.push({
        code: "recovery",
        path: `pool.${i}.recovery`,
        value: name.recovery + recovery,
        message: `The recovery of ${name.id} would be ${name.recovery + recovery}: it must stay from 0 to below 1.`,
      });
      return name;
    }
    if (defaulted.has(name.id))
      return { ...name, recovery: name.recovery + recovery, curve: defaultedName() };
    if (!isMoved) return name;
    const spreads = scale === 1 && shock.shift === 0 ? {} : { scale, shift: shock.shift };
    const bumped = bumpedName(request.pool[i]!, name, market, { ...spreads, recovery });
    if (!bumped)
      problems.push({
        code: "noHazard",
        path: `pool.${i}.credit`,
        message: `The moved spreads of ${name.id} have no hazard from 0 up: shock them less.`,
      });
    return bumped ?? name;
  });
}

/** The request valued with moved names and correlation, and whether a correlation was held at the end of its range. */
function shockedValuation(
  valuation: Valuation,
  { correlation: move }: Shock,
  names: readonly PortfolioName[],
  problems: PricingProblem[],
): { moved: Valuation | null; isHeld: boolean } {
  let isHeld = false;
  const shifted = (rho: number) => {
    const next = Math.min(Math.max(rho + move, 0), HIGHEST_CORRELATION);
    if (Math.abs(next - rho - move) > 1e-15) isHeld = true;
    return next;
  };
  const { request, market, base } = valuation;
  if (move === 0) {
    const kept = base ? { baseNodes: base.nodes } : {};
    return { moved: valuationOf(request, problems, { market, names, ...kept }), isHeld };
  }
  if (base) {
    const baseNodes = base.nodes.map((node) => ({ ...node, rho: shifted(node.rho) }));
    return { moved: valuationOf(request, problems, { market, names, baseNodes }), isHeld };
  }
  const { correlation } = request;
  if (correlation.kind === "flat")
    return {
      moved: valuationOf(request, problems, { market, names, rho: shifted(correlation.rho) }),
      isHeld,
    };
  if (correlation.kind === "sector") {
    const next = {
      ...correlation,
      within: shifted(correlation.within),
      between: shifted(correlation.between),
    };
    return { moved: valuationOf({ ...request, correlation: next }, problems, { market, names }), isHeld };
  }
  const loaded = names.map((name) => ({ ...name, loading: movedLoading(name.loading ?? 0, shifted) }));
  return { moved: valuationOf(request, problems, { market, names: loaded }), isHeld };
}

/** A loading whose square, the name's correlation with the factor squared, is moved; its sign stays. */
function movedLoading(loading: number, shifted: (rho: number) => number): number {
  const size = Math.sqrt(shifted(loading * loading));
  return loading < 0 ? -size : size;
}
