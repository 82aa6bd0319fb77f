import { eventCorrelation, jointDefault } from "../quant/basket/pairs";
import { defaultProbability } from "../quant/market/survivalCurve";
import { defaultThreshold } from "../quant/portfolio/thresholds";
import { assetCorrelation } from "./assetCorrelation";
import type { PricingReport, ReportWarning } from "./report";
import type { Valuation } from "./valuation";

/** Most names whose joint default probabilities are listed pair by pair. */
const MOST_NAMES = 1_000;

/** Joint default probability and event correlation, to maturity, of every pair of names. */
export function pairsReport(
  { request, names, portfolio }: Valuation,
  warnings: ReportWarning[],
): PricingReport["pairs"] {
  const { correlation } = request;
  if (correlation.kind === "base" || names.length > MOST_NAMES) {
    const message =
      correlation.kind === "base"
        ? "A base curve gives no correlation of two names: pairs have no figures here."
        : `Pairs are listed for at most ${MOST_NAMES} names.`;
    warnings.push({ code: "noPairs", message, subject: "pairs" });
    return undefined;
  }
  const maturity = portfolio.times[portfolio.times.length - 1]!;
  const probabilities = names.map((name) => defaultProbability(name.curve, maturity));
  const thresholds = names.map((name) => defaultThreshold(name.curve, maturity));
  const asset = (i: number, j: number) => assetCorrelation(correlation, names[i]!, names[j]!) ?? 0;
  const joint = names.map((_, i) => names.map((_, j) => (i === j ? probabilities[i]! : 0)));
  const event: (number | null)[][] = names.map((_, i) =>
    names.map((_, j) => (i === j && probabilities[i]! > 0 && probabilities[i]! < 1 ? 1 : null)),
  );
  for (let i = 0; i < names.length; i++) {
    for (let j = i + 1; j < names.length; j++) {
      const value = jointDefault(thresholds[i]!, thresholds[j]!, asset(i, j));
      const correlationOfEvents = eventCorrelation(value, probabilities[i]!, probabilities[j]!);
      joint[i]![j] = value;
      joint[j]![i] = value;
      event[i]![j] = correlationOfEvents;
      event[j]![i] = correlationOfEvents;
    }
  }
  return { ids: names.map((name) => name.id), jointDefault: joint, eventCorrelation: event };
}
