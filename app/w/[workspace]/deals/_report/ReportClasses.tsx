"use client";

import { NativeSelect } from "@mantine/core";
import { useMemo } from "react";
import { Figure } from "@/app/_ui/Figure";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useKept } from "@/app/_ui/useKept";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import { PinMark } from "../_talk/Pins";
import { Pointable } from "../_talk/Pointing";
import { hiddenTrancheColumns, type LossesIn, lossesIn, trancheColumns } from "./trancheColumns";

/** Columns that are figures of the report as they stand in it, so that a thread can be pinned to them. */
const PINNED = new Set([
  "expectedLoss",
  "hitProbability",
  "exhaustionProbability",
  "parSpread",
  "upfrontAtRunning",
  "sellerValue",
  "annuity",
  "leverage",
  "defaultsToAttach",
  "defaultsToExhaust",
  "lossGivenHit",
  "standardDeviation",
  "protectionLeg",
  "notional",
]);

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
      cellOf={(column, row) => {
        if (column.key === "name")
          return (
            <>
              {nameOf(row.id)}
              <PinMark pin={{ kind: "class", id: row.id, label: nameOf(row.id) }} />
            </>
          );
        const value = column.value(row);
        if (column.unit === "text" || typeof value !== "number" || measure !== "class") return undefined;
        if (!PINNED.has(column.key)) return undefined;
        return (
          <Pointable
            path={`tranches/${row.id}/${column.key}`}
            label={`${column.header} of ${nameOf(row.id)}`}
          >
            <Figure value={value} unit={column.unit} />
          </Pointable>
        );
      }}
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
