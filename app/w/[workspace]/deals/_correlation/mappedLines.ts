import type { PricingReport } from "@/lib/pricing/report";
import type { BaseCorrelationInput } from "@/lib/pricing/request";
import { strikesAt } from "@/lib/pricing/strikesAt";

/** A strike of the deal, the correlation it gets, and the strike of the quoted pool where the curve reads that. */
export interface MappedLine {
  readonly strike: number;
  readonly rho: number | null;
  readonly quoted: number | null;
  /** Why there is no strike of the quoted pool. */
  readonly why: string;
}

/** The deal's strikes as the mapping carries them to the quoted pool, in rising order. */
export function mappedLines(report: PricingReport, reading: BaseCorrelationInput): MappedLine[] {
  const strikes = new Map<number, number | null>();
  for (const { attachment, detachment, correlation } of report.tranches) {
    if (attachment > 0) strikes.set(attachment, correlation.attachment);
    if (detachment < 1) strikes.set(detachment, correlation.detachment);
  }
  const nodes = report.baseCorrelation?.nodes ?? [];
  return [...strikes]
    .map(([strike, rho]): MappedLine => {
      if (rho === null || nodes.length === 0)
        return { strike, rho, quoted: null, why: "No strike of the quoted pool matches." };
      if (reading.mapping === "none") return { strike, rho, quoted: strike, why: "" };
      const found = strikesAt(nodes, reading, rho);
      if (found?.length === 1) return { strike, rho, quoted: found[0]!, why: "" };
      return {
        strike,
        rho,
        quoted: null,
        why:
          found === null
            ? "Beyond the quoted strikes, where the curve is held flat."
            : "The curve reads this correlation at several strikes.",
      };
    })
    .sort((one, other) => one.strike - other.strike);
}
