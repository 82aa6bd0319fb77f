"use client";

import { NativeSelect } from "@mantine/core";
import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useKept } from "@/app/_ui/useKept";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import { hiddenTrancheColumns, type LossesIn, lossesIn, trancheColumns } from "./trancheColumns";

/** Every class of a run with its figures. */
export function ReportClasses({
  report,
  nameOf,
  currency,
}: {
  report: PricingReport;
  nameOf(id: string): string;
  currency: string;
}) {
  const [kept, setMeasure] = useKept<LossesIn>("losses in");
  const measure = kept ?? "class";
  const columns = useMemo<FigureColumn<TrancheReport>[]>(
    () => [
      { key: "name", header: "Class", unit: "text", value: ({ id }) => nameOf(id) },
      {
        key: "attachment",
        header: "Attachment",
        unit: "percent",
        unitWords: "%",
        value: ({ attachment }) => attachment,
      },
      {
        key: "detachment",
        header: "Detachment",
        unit: "percent",
        unitWords: "%",
        value: ({ detachment }) => detachment,
      },
      ...trancheColumns(currency, measure),
    ],
    [nameOf, currency, measure],
  );
  return (
    <FigureTable
      name="classes of a run"
      columns={columns}
      rows={report.tranches}
      keyOf={({ id }) => id}
      hiddenAtFirst={hiddenTrancheColumns}
      minWidth={1000}
      tools={
        <NativeSelect
          size="xs"
          aria-label="What losses are measured in"
          data={[...lossesIn]}
          value={measure}
          onChange={(event) => setMeasure(event.currentTarget.value as LossesIn)}
        />
      }
    />
  );
}
