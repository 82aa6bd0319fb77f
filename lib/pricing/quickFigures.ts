import { baseCurve } from "../quant/tranche/baseCurve";
import { contractLegs, parSpread, upfrontAt } from "../quant/tranche/legs";
import { type ReadingWeights, readMinima, readTail, weightsAt } from "../quant/tranche/lossCache";
import { lossInside } from "../quant/tranche/lossInside";
import type { QuickCache } from "./quickCache";
import type { TrancheReport } from "./report";
import type { CorrelationInput, TrancheInput } from "./request";

/** A class's figures as they follow a drag: those of its report, but for what needs a whole law. */
export type QuickFigures = Omit<TrancheReport, "standardDeviation" | "quantiles" | "impliedCorrelation">;

/** What may move between one step of a drag and the next. */
export interface QuickStructure {
  readonly tranches: readonly TrancheInput[];
  readonly correlation: CorrelationInput;
}

/** A strike with the correlation it is read at; null where the request fixes the dependence in another way. */
interface Reading {
  readonly strike: number;
  readonly rho: number | null;
  readonly weights: ReadingWeights;
  /** E[min(X, K)] of the live names at dates 0..M; null beyond what is held. */
  readonly minima: Float64Array | null;
}

/** Every class's figures from the cache, in a few microseconds; null for a class that the cache cannot answer. */
export function quickFigures(cache: QuickCache, structure: QuickStructure): (QuickFigures | null)[] {
  const read = readerOf(cache, structure.correlation);
  return structure.tranches.map((tranche) => figuresOf(cache, tranche, read));
}

/** Reads each strike once, each correlation's weights once. */
function readerOf(cache: QuickCache, correlation: CorrelationInput): (strike: number) => Reading | null {
  const rhoAt = correlationReader(cache, correlation);
  const weightsOf = once((rho: number) => weightsAt(cache.losses, rho));
  return once((strike: number) => {
    const rho = rhoAt(strike);
    const weights = rho === undefined ? null : weightsOf(rho ?? 0);
    if (rho === undefined || weights === null) return null;
    const minima = new Float64Array(cache.losses.means.length);
    const isHeld = readMinima(cache.losses, weights, strike - cache.realisedLoss, minima);
    return { strike, rho, weights, minima: isHeld ? minima : null };
  });
}

/** The correlation at a strike; null where the dependence is fixed in another way, undefined where there is none. */
function correlationReader(
  { base }: QuickCache,
  correlation: CorrelationInput,
): (strike: number) => number | null | undefined {
  if (correlation.kind === "flat") return () => correlation.rho;
  if (correlation.kind !== "base") return () => null;
  const nodes = base?.nodes ?? ("nodes" in correlation ? correlation.nodes : []);
  if (!base || nodes.length === 0) return () => undefined;
  const curve = baseCurve(nodes, correlation);
  return (strike) => {
    const mapped = Math.max(0, strike) * base.strikeRatio;
    return mapped > 1 || mapped > base.usableUpTo + 1e-12 ? undefined : curve(mapped);
  };
}

function once<Value>(make: (key: number) => Value): (key: number) => Value {
  const known = new Map<number, Value>();
  return (key) => {
    let value = known.get(key);
    if (value === undefined) {
      value = make(key);
      known.set(key, value);
    }
    return value;
  };
}

function figuresOf(
  cache: QuickCache,
  input: TrancheInput,
  read: (strike: number) => Reading | null,
): QuickFigures | null {
  const { attachment, detachment, id, running } = input;
  const low = read(attachment);
  const high = read(detachment);
  const width = detachment - attachment;
  if (!low || !high || width <= 0) return null;
  const loss = lossBetween(cache, low, high);
  const paidDown = paidDownBetween(cache, input);
  if (!loss || !paidDown) return null;
  const outstanding = new Float64Array(loss.length);
  for (let j = 0; j < loss.length; j++) outstanding[j] = Math.max(0, 1 - loss[j]! - paidDown[j]!);
  const legs = contractLegs(cache.times, loss, outstanding);
  const expectedLoss = loss[loss.length - 1]!;
  const hit = tail(cache, low, false);
  const exhaustion = tail(cache, high, true);
  if (hit === null || exhaustion === null) return null;
  const notional = width * cache.notional;
  const upfront = running === undefined ? null : upfrontAt(legs, running);
  return {
    id,
    attachment,
    detachment,
    notional,
    correlation: { attachment: attachment > 0 ? low.rho : null, detachment: high.rho },
    expectedLoss,
    hitProbability: hit,
    exhaustionProbability: exhaustion,
    lossGivenHit: hit > 0 ? expectedLoss / hit : null,
    leverage: cache.poolLoss > 0 ? expectedLoss / cache.poolLoss : null,
    defaultsToAttach: cache.averageLoss > 0 ? attachment / cache.averageLoss : null,
    defaultsToExhaust: cache.averageLoss > 0 ? detachment / cache.averageLoss : null,
    protectionLeg: legs.protection,
    annuity: legs.annuity,
    parSpread: parSpread(legs),
    upfrontAtRunning: upfront,
    sellerValue: upfront === null ? null : notional * ((input.upfront ?? 0) - upfront),
  };
}

/** EL(t_j) of the tranche, realised losses included. */
function lossBetween({ realisedLoss }: QuickCache, low: Reading, high: Reading): Float64Array | null {
  if (!low.minima || !high.minima) return null;
  const width = high.strike - low.strike;
  const certain = lossInside(realisedLoss, { attachment: low.strike, detachment: high.strike });
  const loss = new Float64Array(low.minima.length);
  for (let j = 0; j < loss.length; j++) loss[j] = (certain + high.minima[j]! - low.minima[j]!) / width;
  return loss;
}

/** AM(t_j); only where recoveries cannot end inside the tranche, so that their mean is all there is to know. */
function paidDownBetween(cache: QuickCache, input: TrancheInput): Float64Array | null {
  const { attachment, detachment } = input;
  const { largestRecovery, realisedRecovery, recoveryMeans } = cache;
  const none = new Float64Array(recoveryMeans.length);
  if (!(input.recoveryPaydown ?? detachment === 1)) return none;
  const most = realisedRecovery + largestRecovery;
  if (1 - detachment >= most) return none;
  if (detachment < 1 || 1 - attachment < most) return null;
  return recoveryMeans.map((mean) => (realisedRecovery + mean) / (detachment - attachment));
}

function tail({ losses, realisedLoss }: QuickCache, { strike, weights }: Reading, orAt: boolean) {
  const live = strike - realisedLoss;
  if (orAt ? live <= 1e-11 : live < -1e-11) return 1;
  return readTail(losses, weights, live, orAt);
}
