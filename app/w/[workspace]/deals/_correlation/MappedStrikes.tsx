"use client";

import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { PricingReport } from "@/lib/pricing/report";
import type { BaseCorrelationInput } from "@/lib/pricing/request";
import { mappingWords } from "./words";

interface Line {
  readonly strike: number;
  readonly rho: number | null;
}

/** Each strike of the deal with the correlation that the curve gives it through the mapping. */
export function MappedStrikes({ report, reading }: { report: PricingReport; reading: BaseCorrelationInput }) {
  const strikes = new Map<number, number | null>();
  for (const { attachment, detachment, correlation } of report.tranches) {
    if (attachment > 0) strikes.set(attachment, correlation.attachment);
    if (detachment < 1) strikes.set(detachment, correlation.detachment);
  }
  const lines = [...strikes]
    .map(([strike, rho]) => ({ strike, rho }))
    .sort((one, other) => one.strike - other.strike);
  const columns: FigureColumn<Line>[] = [
    {
      key: "strike",
      header: "Strike of the deal",
      unit: "percent",
      unitWords: "% of pool",
      value: ({ strike }) => strike,
    },
    {
      key: "rho",
      header: `Correlation by "${mappingWords[reading.mapping]}"`,
      unit: "percent",
      unitWords: "%",
      value: ({ rho }) => rho,
    },
  ];
  if (lines.length === 0) return null;
  return (
    <FigureTable
      name="mapped strikes"
      columns={columns}
      rows={lines}
      keyOf={({ strike }) => String(strike)}
      minWidth={360}
    />
  );
}
