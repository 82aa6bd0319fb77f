import { bootstrapSurvival, parSpread, type SwapQuote } from "../quant/market/defaultSwap";
import { evenSchedule, type PaymentSchedule, tenorSchedule } from "../quant/market/schedule";
import { flatHazard, type SurvivalCurve } from "../quant/market/survivalCurve";
import type { PortfolioName } from "../quant/portfolio/portfolio";
import type { MarketSide } from "./curves";
import type { NameInput } from "./request";

/** How a name's quoted side is moved: spreads to `scale · s + shift`, recovery by `recovery`, with discount factors of another market if given. */
export interface NameBump {
  readonly shift?: number;
  readonly scale?: number;
  readonly recovery?: number;
  readonly market?: MarketSide;
}

/** A name's quotes as par spreads (or its upfront quote) on the market it was given in. */
interface QuotedName {
  readonly quotes: readonly (SwapQuote & { readonly isUpfront: boolean })[];
}

/**
 * The name re-solved after a bump. Spread curves move at every node; a name given otherwise is read as its par spread at
 * the deal's maturity (cumulative probabilities: at each node) and re-solved from there. Null when no hazard is left.
 */
export function bumpedName(
  input: NameInput,
  name: PortfolioName,
  market: MarketSide,
  bump: NameBump,
): PortfolioName | null {
  if (name.curve.defaulted) return name;
  const recovery = name.recovery + (bump.recovery ?? 0);
  const target = bump.market ?? market;
  const { quotes } = quotedName(input, name, market);
  const moved = quotes.map((quote) => ({
    ...quote,
    coupon: quote.isUpfront ? quote.coupon : quote.coupon * (bump.scale ?? 1) + (bump.shift ?? 0),
  }));
  const isSpreadMove = bump.shift !== undefined || bump.scale !== undefined;
  const asSpreads =
    isSpreadMove && moved.some((quote) => quote.isUpfront) ? [parQuote(name, market, bump)] : moved;
  const curve = bootstrapSurvival(asSpreads, target.discount, recovery);
  if (!curve.ok) return null;
  const isFlat = input.credit.kind !== "spread" && input.credit.kind !== "cumulative";
  return { ...name, recovery, curve: isFlat ? flattened(curve.value) : curve.value };
}

/** An upfront name under a spread bump: its par spread at the deal's maturity, moved. */
function parQuote(name: PortfolioName, market: MarketSide, bump: NameBump): SwapQuote {
  const spread = parSpread(market.schedule, market.discount, name.curve, name.recovery) ?? 0;
  const coupon = spread * (bump.scale ?? 1) + (bump.shift ?? 0);
  return { schedule: market.schedule, coupon, upfront: 0, years: market.schedule.maturity, path: "credit" };
}

function flattened(curve: SurvivalCurve): SurvivalCurve {
  return flatHazard(curve.cumulative[0]! / curve.times[0]!);
}

function quotedName(input: NameInput, name: PortfolioName, market: MarketSide): QuotedName {
  const { credit } = input;
  if (credit.kind === "spread") {
    return {
      quotes: credit.nodes.map((node, k) => ({
        schedule: scheduleOf(market, node.years),
        coupon: node.spread,
        upfront: 0,
        years: node.years,
        path: `credit.nodes.${k}`,
        isUpfront: false,
      })),
    };
  }
  if (credit.kind === "upfront") {
    const { years, coupon, upfront } = credit;
    return {
      quotes: [
        { schedule: scheduleOf(market, years), coupon, upfront, years, path: "credit", isUpfront: true },
      ],
    };
  }
  const schedules =
    credit.kind === "cumulative"
      ? credit.nodes.map((node) => nodeSchedule(market, node.years))
      : [market.schedule];
  return {
    quotes: schedules.map((schedule) => ({
      schedule,
      coupon: parSpread(schedule, market.discount, name.curve, name.recovery) ?? 0,
      upfront: 0,
      years: schedule.maturity,
      path: "credit",
      isUpfront: false,
    })),
  };
}

function scheduleOf(market: MarketSide, years: number): PaymentSchedule {
  const schedule = tenorSchedule(market.rule, years);
  return schedule.ok ? schedule.value : nodeSchedule(market, years);
}

/** A contract that ends exactly at a node: whole periods of the schedule's length or a little shorter. */
function nodeSchedule(market: MarketSide, years: number): PaymentSchedule {
  const perYear = market.rule.kind === "even" ? market.rule.perYear : 4;
  const count = Math.max(1, Math.ceil(years * perYear - 1e-9));
  return evenSchedule(count, count / years);
}
