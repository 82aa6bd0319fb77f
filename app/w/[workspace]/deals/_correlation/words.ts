import type { CorrelationText } from "@/lib/deals/correlationForm";

/** What each kind of correlation is called on screen. */
export const correlationWords: Record<CorrelationText["kind"], string> = {
  flat: "Flat",
  loadings: "Each name's own loading",
  sector: "By sector",
  base: "Base curve, typed here",
  market: "Base curve of a quoted pool",
  stored: "As stored through the interface",
};

export const mappingWords: Record<CorrelationText["mapping"], string> = {
  none: "Same strike",
  moneyness: "Strike over expected loss",
  lossShare: "Share of expected loss",
  probability: "Probability of the strike",
};
