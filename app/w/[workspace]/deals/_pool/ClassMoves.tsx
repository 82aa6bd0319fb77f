"use client";

import { Loader, Text } from "@mantine/core";
import { useMemo } from "react";
import { Problems } from "@/app/_ui/Problems";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { usePriced } from "@/app/_ui/usePriced";
import type { TrancheReport } from "@/lib/pricing/report";
import { useDeal } from "../_frame/dealContext";

interface Line {
  readonly id: string;
  readonly name: string;
  readonly saved: TrancheReport | null;
  readonly tried: TrancheReport | null;
}

/** Each class with the saved names and with those tried: expected loss, par spread, value, and how they move. */
export function ClassMoves() {
  const { request, parts, tried, form } = useDeal();
  const plain = useMemo(() => request && parts && { ...request, pool: [...parts.names] }, [request, parts]);
  const saved = usePriced(plain);
  const moved = usePriced(tried ? request : null);
  const currency = parts?.currency ?? "EUR";
  const lines = form.classes.map(({ id, name }) => ({
    id,
    name,
    saved: saved.report?.tranches.find((row) => row.id === id) ?? null,
    tried: tried ? (moved.report?.tranches.find((row) => row.id === id) ?? null) : null,
  }));
  const columns = useMemo(() => columnsOf(currency, tried !== null), [currency, tried]);
  return (
    <div>
      {(saved.isBusy || (tried && moved.isBusy)) && (
        <Text size="sm" c="dimmed" role="status">
          <Loader size="xs" /> Pricing the classes…
        </Text>
      )}
      <Problems title="What is tried cannot be priced" problems={tried ? moved.problems : []} />
      <FigureTable name="class moves" columns={columns} rows={lines} keyOf={({ id }) => id} minWidth={720} />
    </div>
  );
}

function columnsOf(currency: string, isTried: boolean): FigureColumn<Line>[] {
  const figures = [
    { key: "expectedLoss", header: "Expected loss", unit: "percent", words: "% of class" },
    { key: "parSpread", header: "Par spread", unit: "basisPoints", words: "bp" },
    { key: "sellerValue", header: "Value to seller", unit: "money", words: currency },
  ] as const;
  return [
    { key: "name", header: "Class", unit: "text", value: ({ name }) => name },
    ...figures.flatMap(({ key, header, unit, words }): FigureColumn<Line>[] => {
      const plain = { unit, unitWords: words } as const;
      const saved = {
        key: `${key} saved`,
        header,
        ...plain,
        value: (line: Line) => line.saved?.[key] ?? null,
      };
      if (!isTried) return [saved];
      return [
        { ...saved, header: `${header}, saved` },
        {
          key: `${key} tried`,
          header: `${header}, tried`,
          ...plain,
          value: (line) => line.tried?.[key] ?? null,
        },
        {
          key: `${key} move`,
          header: "Move",
          ...plain,
          value: ({ saved: from, tried: to }) => {
            const [before, after] = [from?.[key] ?? null, to?.[key] ?? null];
            return before === null || after === null ? null : after - before;
          },
        },
      ];
    }),
  ];
}
