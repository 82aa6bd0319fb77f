import type { PricingProblem } from "../pricing/problem";

/** What a pricing thread answers: the report's text (one stringification, the same bits everywhere), or the problems. */
export type PricingAnswer =
  | { readonly ok: true; readonly report: string; readonly milliseconds: number }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };
