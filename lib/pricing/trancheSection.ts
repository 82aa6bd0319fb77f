import type { Distribution } from "../quant/portfolio/distribution";
import { type TrancheProfile, type TrancheStrikes, trancheProfile } from "../quant/tranche/expectedLoss";
import { contractLegs, type Legs, parSpread, upfrontAt } from "../quant/tranche/legs";
import { lossInside } from "../quant/tranche/lossInside";
import { QUANTILE_LEVELS, standardDeviation, trancheQuantile } from "../quant/tranche/measures";
import type { ReportWarning, TrancheReport } from "./report";
import type { TrancheInput } from "./request";
import type { Valuation } from "./valuation";

/** A tranche's profile and legs, or null where a strike cannot be read. */
export interface ValuedTranche {
  readonly input: TrancheInput;
  readonly profile: TrancheProfile;
  readonly legs: Legs;
}

export function strikesOfTranche(input: TrancheInput): TrancheStrikes {
  const { attachment, detachment } = input;
  return { attachment, detachment, recoveryPaydown: input.recoveryPaydown ?? detachment === 1 };
}

/** Values a tranche; null when the base curve cannot be read at one of its strikes. */
export function valuedTranche(valuation: Valuation, input: TrancheInput): ValuedTranche | null {
  const { base } = valuation;
  if (base && !(base.curve && base.isUsable(input.attachment) && base.isUsable(input.detachment)))
    return null;
  const profile = trancheProfile(valuation.laws, valuation.dependence, strikesOfTranche(input));
  return { input, profile, legs: contractLegs(valuation.times, profile.loss, profile.outstanding) };
}

/** Value to the protection seller in currency: upfront received + s · annuity − C; null without a running coupon. */
export function sellerValue(valued: ValuedTranche, notional: number): number | null {
  const { running, upfront } = valued.input;
  if (running === undefined) return null;
  return notional * ((upfront ?? 0) + running * valued.legs.annuity - valued.legs.protection);
}

/** Everything the report says of one tranche. */
export function trancheReport(
  valuation: Valuation,
  input: TrancheInput,
  warnings: ReportWarning[],
): TrancheReport {
  const { portfolio, dependence } = valuation;
  const { attachment, detachment } = input;
  const width = detachment - attachment;
  const notional = width * portfolio.notional;
  const head = {
    id: input.id,
    attachment,
    detachment,
    notional,
    correlation: strikeCorrelations(valuation, input),
  };
  const averageLoss = averageNameLoss(valuation);
  const defaults = {
    defaultsToAttach: averageLoss > 0 ? attachment / averageLoss : null,
    defaultsToExhaust: averageLoss > 0 ? detachment / averageLoss : null,
  };
  const valued = valuedTranche(valuation, input);
  if (!valued) return { ...head, ...defaults, ...NO_FIGURES };
  const { legs, profile } = valued;
  const dates = profile.loss.length;
  const expectedLoss = profile.loss[dates - 1]!;
  const { hit, exhaustion } = strikeProbabilities(valuation, input, warnings);
  const poolLoss = portfolio.expectedLoss[dates - 1]!;
  const common =
    dependence.kind === "common" ? valuation.laws.whole("loss", dates - 1, dependence.dependence) : null;
  return {
    ...head,
    expectedLoss,
    hitProbability: hit,
    exhaustionProbability: exhaustion,
    lossGivenHit: hit > 0 ? expectedLoss / hit : null,
    ...riskMeasures(valuation, input, common),
    leverage: poolLoss > 0 ? expectedLoss / poolLoss : null,
    ...defaults,
    protectionLeg: legs.protection,
    annuity: legs.annuity,
    parSpread: parSpread(legs),
    upfrontAtRunning: input.running === undefined ? null : upfrontAt(legs, input.running),
    sellerValue: sellerValue(valued, notional),
  };
}

const NO_FIGURES = {
  expectedLoss: null,
  hitProbability: null,
  exhaustionProbability: null,
  lossGivenHit: null,
  standardDeviation: null,
  leverage: null,
  quantiles: [],
  protectionLeg: null,
  annuity: null,
  parSpread: null,
  upfrontAtRunning: null,
  sellerValue: null,
};

function strikeCorrelations({ request, base }: Valuation, { attachment, detachment }: TrancheInput) {
  if (base) {
    const at = (strike: number) =>
      strike > 0 && base.curve && base.isUsable(strike) ? base.curve(base.mapped(strike)!) : null;
    return { attachment: at(attachment), detachment: at(detachment) };
  }
  const rho = request.correlation.kind === "flat" ? request.correlation.rho : null;
  return { attachment: attachment > 0 ? rho : null, detachment: rho };
}

/** Mean loss of a name at its default, a fraction of the pool. */
export function averageNameLoss({ names, portfolio }: Valuation): number {
  let sum = 0;
  for (const name of names) sum += (name.notional / portfolio.notional) * (1 - name.recovery);
  return sum / names.length;
}

/** Strikes left for the live names, and the loss already realised inside the tranche. */
function liveStrikes({ portfolio }: Valuation, { attachment, detachment }: TrancheInput) {
  const realised = portfolio.realisedLoss;
  return {
    low: Math.max(attachment - realised, 0),
    high: Math.max(detachment - realised, 0),
    shift: lossInside(realised, { attachment, detachment }),
  };
}

function riskMeasures(valuation: Valuation, input: TrancheInput, common: Distribution | null) {
  if (!common) return { standardDeviation: null, quantiles: [] };
  const { low, high, shift } = liveStrikes(valuation, input);
  const width = input.detachment - input.attachment;
  return {
    standardDeviation: standardDeviation(common, low, high, shift, width),
    quantiles: QUANTILE_LEVELS.map((level) => trancheQuantile(common, level, low, high, shift, width)),
  };
}

/** P(L > A) and P(L ≥ D) at maturity; under a base curve each at its own strike's correlation. */
function strikeProbabilities(valuation: Valuation, input: TrancheInput, warnings: ReportWarning[]) {
  const { attachment, detachment } = input;
  const realised = valuation.portfolio.realisedLoss;
  const from = realised >= detachment - 1e-11 ? 1 : lawAt(valuation, detachment).from(detachment - realised);
  for (const strike of [attachment, detachment]) {
    if (strike > realised && lawAt(valuation, strike).isAtom(strike - realised)) {
      const message = `A loss of exactly ${strike} of the pool has probability above zero: the hit probability counts losses above a strike, exhaustion those at it too.`;
      if (
        !warnings.some((warning) => warning.code === "latticeStrike" && warning.subject === String(strike))
      ) {
        warnings.push({ code: "latticeStrike", message, subject: String(strike) });
      }
    }
  }
  return { hit: probabilityAbove(valuation, attachment), exhaustion: clamp(from) };
}

/** P(L > strike) at maturity; under a base curve at the strike's own correlation. */
export function probabilityAbove(valuation: Valuation, strike: number): number {
  const realised = valuation.portfolio.realisedLoss;
  return realised > strike + 1e-11 ? 1 : clamp(lawAt(valuation, strike).above(strike - realised));
}

/** The law of the loss at maturity that a strike's probabilities are read from. */
function lawAt({ dependence, laws, portfolio }: Valuation, strike: number): Distribution {
  const last = portfolio.times.length - 1;
  if (dependence.kind === "common") return laws.whole("loss", last, dependence.dependence, laws.isExact);
  const own = { kind: "flat", rho: dependence.rhoAt(strike) } as const;
  return laws.atStrike("loss", last, own, strike - portfolio.realisedLoss, laws.isExact);
}

function clamp(probability: number): number {
  return Math.min(1, Math.max(0, probability));
}
