"use client";

import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import { useDeal } from "../_frame/dealContext";

/** The flat correlations at which each class's quote is met: all of them, or the range of upfronts that can be met. */
export function ImpliedTable({ report }: { report: PricingReport }) {
  const { form } = useDeal();
  const typed = (id: string) => form.classes.find((row) => row.id === id);
  const columns: FigureColumn<TrancheReport>[] = [
    { key: "name", header: "Class", unit: "text", value: ({ id }) => typed(id)?.name || id },
    {
      key: "quote",
      header: "Quoted upfront",
      unit: "text",
      unitWords: "%",
      value: ({ id }) => typed(id)?.upfront || "—",
    },
    {
      key: "model",
      header: "Model upfront",
      unit: "percent",
      unitWords: "%",
      value: (row) => row.upfrontAtRunning,
    },
    {
      key: "first",
      header: "Implied correlation",
      unit: "percent",
      unitWords: "%",
      value: (row) => row.impliedCorrelation?.solutions[0] ?? null,
    },
    {
      key: "second",
      header: "Second solution",
      unit: "percent",
      unitWords: "%",
      value: (row) => row.impliedCorrelation?.solutions[1] ?? null,
    },
    {
      key: "low",
      header: "Attainable from",
      unit: "percent",
      unitWords: "% upfront",
      value: (row) => row.impliedCorrelation?.attainable[0] ?? null,
    },
    {
      key: "high",
      header: "to",
      unit: "percent",
      unitWords: "% upfront",
      value: (row) => row.impliedCorrelation?.attainable[1] ?? null,
    },
    {
      key: "words",
      header: "Reading",
      unit: "text",
      value: ({ impliedCorrelation: found }) => {
        if (!found) return "No quote";
        const count = found.solutions.length;
        if (count === 0) return "No flat correlation meets the quote";
        return count === 1 ? "One solution" : `${count} solutions: the quote does not tell which`;
      },
    },
  ];
  return (
    <FigureTable
      name="implied correlations"
      columns={columns}
      rows={report.tranches}
      keyOf={({ id }) => id}
    />
  );
}
