import { impliedCorrelations } from "../quant/tranche/impliedCorrelation";
import type { TrancheReport } from "./report";
import { strikesOfTranche } from "./trancheSection";
import type { Valuation } from "./valuation";

/** Implied correlations of the tranches that carry a quote (running and upfront), in the order of the tranches. */
export function impliedReports({
  request,
  laws,
  times,
}: Valuation): (TrancheReport["impliedCorrelation"] | undefined)[] {
  const quoted = request.tranches.flatMap((tranche, i) =>
    tranche.running !== undefined && tranche.upfront !== undefined
      ? [{ i, quote: { ...strikesOfTranche(tranche), running: tranche.running, upfront: tranche.upfront } }]
      : [],
  );
  const found = impliedCorrelations(
    laws,
    times,
    quoted.map(({ quote }) => quote),
  );
  const reports = new Array<TrancheReport["impliedCorrelation"] | undefined>(request.tranches.length).fill(
    undefined,
  );
  for (const [k, { i }] of quoted.entries()) {
    const { solutions, attainable } = found[k]!;
    reports[i] = { solutions: [...solutions], attainable: [attainable[0], attainable[1]] };
  }
  return reports;
}
