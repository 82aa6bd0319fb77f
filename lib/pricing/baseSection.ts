import { arbitrageMarks } from "../quant/tranche/arbitrage";
import type { PricingReport, ReportWarning } from "./report";
import type { Valuation } from "./valuation";

/** The base curve as read, where its ladder stopped, where it allows arbitrage; warnings for classes that touch that. */
export function baseReport(
  { request, base }: Valuation,
  warnings: ReportWarning[],
): PricingReport["baseCorrelation"] {
  if (!base) return undefined;
  const stopped = base.ladder?.stopped;
  const arbitrage = base.curve ? arbitrageMarks(base.indexLaws, base.curve) : [];
  for (const tranche of request.tranches) {
    for (const strike of new Set([tranche.attachment, tranche.detachment])) {
      if (strike > 0 && base.curve && base.mapped(strike) === null) {
        const message = `Strike ${strike} has no corresponding strike of the index pool: tranche ${tranche.id} has no figures.`;
        warnings.push({ code: "noMapping", message, subject: String(strike) });
      } else if (strike > 0 && !base.isUsable(strike)) {
        const message = `The quotes determine no correlation at strike ${strike}: tranche ${tranche.id} has no figures.`;
        warnings.push({ code: "stoppedLadder", message, subject: String(strike) });
      }
    }
    const low = base.mapped(tranche.attachment) ?? tranche.attachment;
    const high = base.mapped(tranche.detachment) ?? tranche.detachment;
    if (arbitrage.some((mark) => mark.from < high && mark.to > low)) {
      const message = `The base curve allows arbitrage between the strikes of tranche ${tranche.id}: its figures are not to be relied on.`;
      warnings.push({ code: "arbitrage", message, subject: tranche.id });
    }
  }
  return {
    nodes: base.nodes.map(({ strike, rho }) => ({ strike, rho })),
    ...(stopped
      ? {
          stopped: {
            strike: stopped.strike,
            reason: "No correlation at this detachment reproduces the quote.",
            attainable: [...stopped.attainable] as [number, number],
          },
        }
      : {}),
    arbitrage,
  };
}
