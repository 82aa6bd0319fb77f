import { defaultProbability } from "../quant/market/survivalCurve";
import { contractLegs } from "../quant/tranche/legs";
import { lossInside } from "../quant/tranche/lossInside";
import { bumpedName } from "./bumps";
import { type StrikeResponse, strikeResponses } from "./nameResponses";
import type { PricingRequest, TrancheInput } from "./request";
import { sellerValue, strikesOfTranche, type ValuedTranche, valuedTranche } from "./trancheSection";
import type { Valuation } from "./valuation";

const BASIS_POINT = 1e-4;

/** What one name does to every tranche's value. */
export interface NameDifference {
  readonly id: string;
  readonly spread01: (number | null)[];
  readonly jumpToDefault: (number | null)[];
}

const MANY = 400;

/** Whether a request's names are likely to be taken all at once, so that there is nothing to gain from asking in pieces. */
export function isTakenAtOnce({ correlation, law, pool }: PricingRequest): boolean {
  if (law?.kind === "largePool" || correlation.kind === "sector" || pool.length >= MANY) return false;
  return correlation.kind !== "base" || correlation.mapping === "none";
}

/**
 * Spread 01 and jump to default of the names at `places`, all from one pass over the laws instead of two full valuations each; the
 * same definite bumps, and exact, for an expected loss is linear in one name's conditional default probability. Null where
 * only full valuations will do: laws without a grid, mapped base curves, recoveries that may end inside a tranche.
 */
export function namesAtOnce(
  valuation: Valuation,
  today: readonly (number | null)[],
  places: readonly number[],
): NameDifference[] | null {
  const { market, names, portfolio, request } = valuation;
  const { correlation } = request;
  if (correlation.kind === "base" && correlation.mapping !== "none") return null;
  const tranches = request.tranches.map((tranche) => valuedTranche(valuation, tranche));
  if (!request.tranches.every((tranche) => isPaidDownByMean(valuation, tranche))) return null;
  const wanted = new Set(places);
  const bumped = names.map((name, i) =>
    wanted.has(i) ? bumpedName(request.pool[i]!, name, market, { shift: BASIS_POINT }) : name,
  );
  const strikes = new Set(
    request.tranches.flatMap(({ attachment, detachment }, i) =>
      tranches[i] ? [attachment, detachment] : [],
    ),
  );
  const moved = names.map((name, i) => bumped[i] ?? name);
  const responses = strikeResponses(
    valuation,
    [...strikes].sort((one, other) => one - other),
    moved,
  );
  if (!responses) return null;
  const placeInLive = new Map(portfolio.live.map(({ position }, k) => [position, k]));
  return places.map((i) => {
    const id = names[i]!.id;
    const k = placeInLive.get(i);
    const none = today.map(() => null);
    if (k === undefined) return { id, spread01: none, jumpToDefault: none };
    const { loss, recovered } = portfolio.live[k]!;
    const rise = (j: number) =>
      defaultProbability(moved[i]!.curve, portfolio.times[j]!) -
      defaultProbability(names[i]!.curve, portfolio.times[j]!);
    const left = (j: number) => 1 - (j === 0 ? 0 : defaultProbability(names[i]!.curve, portfolio.times[j]!));
    return {
      id,
      spread01: tranches.map((valued, t) => {
        if (!valued || !bumped[i] || today[t] === null) return null;
        const change = {
          part: "moved" as const,
          k,
          realised: 0,
          recovery: (j: number) => recovered * rise(j),
        };
        return changedValue(valuation, valued, responses, change) - today[t]!;
      }),
      jumpToDefault: tranches.map((valued, t) => {
        if (!valued || today[t] === null) return null;
        const change = {
          part: "certain" as const,
          k,
          realised: loss,
          recovery: (j: number) => recovered * left(j),
        };
        const then = changedValue(valuation, valued, responses, change);
        return then - today[t]! - portfolio.notional * realisedBetween(valuation, valued.input, loss);
      }),
    };
  });
}

interface Change {
  readonly part: keyof StrikeResponse;
  readonly k: number;
  /** Loss realised today. */
  readonly realised: number;
  /** What recoveries rise by to date j. */
  recovery(j: number): number;
}

/** A tranche's value after one name's change. */
function changedValue(
  valuation: Valuation,
  { input, profile }: ValuedTranche,
  responses: ReadonlyMap<number, StrikeResponse>,
  { part, k, realised, recovery }: Change,
): number {
  const { attachment, detachment } = input;
  const width = detachment - attachment;
  const { recoveryPaydown } = strikesOfTranche(input);
  const upper = responses.get(detachment)![part];
  const lower = responses.get(attachment)![part];
  const dates = profile.loss.length;
  const loss = new Float64Array(dates);
  const outstanding = new Float64Array(dates);
  for (let j = 0; j < dates; j++) {
    const change =
      j === 0 ? realisedBetween(valuation, input, realised) : upper[j - 1]![k]! - lower[j - 1]![k]!;
    loss[j] = profile.loss[j]! + change / width;
    const isLater = j > 0 || realised > 0;
    const paidDown =
      profile.paidDown[j]! + (recoveryPaydown && detachment === 1 && isLater ? recovery(j) / width : 0);
    outstanding[j] = Math.max(0, 1 - loss[j]! - paidDown);
  }
  const legs = contractLegs(valuation.times, loss, outstanding);
  return sellerValue({ input, profile, legs }, width * valuation.portfolio.notional) ?? 0;
}

/** What a loss realised today on top of what is realised takes from a tranche, a fraction of the pool. */
function realisedBetween({ portfolio }: Valuation, tranche: TrancheInput, more: number): number {
  return lossInside(portfolio.realisedLoss + more, tranche) - lossInside(portfolio.realisedLoss, tranche);
}

/** Whether recoveries cannot end inside the tranche, so that their mean is all there is to know. */
function isPaidDownByMean({ portfolio }: Valuation, tranche: TrancheInput): boolean {
  const { attachment, detachment, recoveryPaydown } = strikesOfTranche(tranche);
  if (!recoveryPaydown) return true;
  const most = portfolio.live.reduce((sum, { recovered }) => sum + recovered, portfolio.realisedRecovery);
  return 1 - detachment >= most || (detachment === 1 && 1 - attachment >= most);
}
