import { blankCorrelation } from "@/lib/deals/correlationForm";
import type { DealForm } from "@/lib/deals/form";

/** The form of a deal to be: the first pool and market, five years, a flat correlation, no class yet. */
export function blankDeal(
  pools: readonly { readonly id: string }[],
  markets: readonly { readonly id: string; readonly pricingDate: string }[],
): DealForm {
  const date = markets[0]?.pricingDate ?? "";
  const year = Number(date.slice(0, 4)) + 5;
  return {
    name: "",
    poolId: pools[0]?.id ?? "",
    marketId: markets[0]?.id ?? "",
    maturity: date ? `${year}-12-20` : "",
    years: "5",
    rho: "30",
    correlation: blankCorrelation,
    law: "finite",
    classes: [],
    nthToDefault: "",
    notes: "",
  };
}
