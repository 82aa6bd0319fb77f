import type { MarketContent } from "@/lib/markets/schema";
import type { NameInput } from "@/lib/pricing/request";

/** A name with a 100 bp spread at five years, unless told otherwise. */
export function aName(part: Partial<NameInput> & Pick<NameInput, "id">): NameInput {
  const credit = { kind: "spread" as const, nodes: [{ years: 5, spread: 0.01 }] };
  return { name: `Name ${part.id}`, sector: "Foods", notional: 10_000_000, recovery: 0.4, credit, ...part };
}

/** What a new pool is made of: names A01, A02, … */
export function aPool(count = 3): { name: string; currency: string; names: NameInput[] } {
  const names = Array.from({ length: count }, (_, i) => aName({ id: `A${String(i + 1).padStart(2, "0")}` }));
  return { name: "Harbour pool", currency: "EUR", names };
}

/** What a new market is made of: a flat 2 % and standard dates. */
export function aMarket(): { name: string; pricingDate: string; content: MarketContent } {
  const content: MarketContent = {
    discount: { kind: "flat", rate: 0.02 },
    schedule: { kind: "standard", holidays: ["2026-12-25"] },
  };
  return { name: "Year end", pricingDate: "2026-11-30", content };
}
