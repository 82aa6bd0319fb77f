"use client";

import { Figure } from "@/app/_ui/Figure";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { PricingReport } from "@/lib/pricing/report";
import { PinMark } from "../_talk/Pins";

type Base = NonNullable<PricingReport["baseCorrelation"]>;
interface Quote {
  readonly attachment: number;
  readonly detachment: number;
  readonly running: number;
  readonly upfront: number;
}
type Line = { readonly strike: number; readonly rho: number | null; readonly quote: Quote | null };

/** The curve's strikes with their correlations, and the quotes that they were solved from. */
export function QuotesTable({ base, quotes }: { base: Base; quotes: readonly Quote[] }) {
  const strikes = [
    ...new Set([...base.nodes.map(({ strike }) => strike), ...quotes.map((quote) => quote.detachment)]),
  ];
  const lines = strikes
    .sort((one, other) => one - other)
    .map((strike) => ({
      strike,
      rho: base.nodes.find((node) => node.strike === strike)?.rho ?? null,
      quote: quotes.find((quote) => quote.detachment === strike) ?? null,
    }));
  const quoted: FigureColumn<Line>[] = [
    {
      key: "attachment",
      header: "Quoted from",
      unit: "percent",
      unitWords: "%",
      value: ({ quote }) => quote?.attachment ?? null,
    },
    {
      key: "running",
      header: "Coupon",
      unit: "basisPoints",
      unitWords: "bp",
      value: ({ quote }) => quote?.running ?? null,
    },
    {
      key: "upfront",
      header: "Upfront",
      unit: "percent",
      unitWords: "%",
      value: ({ quote }) => quote?.upfront ?? null,
    },
  ];
  const columns: FigureColumn<Line>[] = [
    { key: "strike", header: "Strike", unit: "percent", unitWords: "%", value: ({ strike }) => strike },
    { key: "rho", header: "Base correlation", unit: "percent", unitWords: "%", value: ({ rho }) => rho },
    ...(quotes.length > 0 ? quoted : []),
  ];
  return (
    <FigureTable
      name="base curve"
      columns={columns}
      rows={lines}
      keyOf={({ strike }) => String(strike)}
      minWidth={360}
      cellOf={({ key }, { strike, quote }) => {
        if (key !== "strike" || !quote) return undefined;
        const label = `quote ${percent(quote.attachment)} to ${percent(quote.detachment)} %`;
        return (
          <>
            <Figure value={strike} unit="percent" />
            <PinMark pin={{ kind: "quote", id: String(strike), label }} />
          </>
        );
      }}
    />
  );
}

function percent(strike: number): string {
  return String(Number((100 * strike).toPrecision(6)));
}
