"use client";

import { Text } from "@mantine/core";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { PricingReport } from "@/lib/pricing/report";

type Mark = NonNullable<PricingReport["baseCorrelation"]>["arbitrage"][number];

export const arbitrageWords: Record<Mark["kind"], string> = {
  decreasing: "loss below a strike falls as the strike rises",
  slope: "a strip would lose more than all of it",
  convex: "a higher strip would lose more than a lower one",
};

const columns: FigureColumn<Mark & { readonly number: number }>[] = [
  { key: "number", header: "Mark", unit: "plain", value: ({ number }) => number },
  { key: "kind", header: "Arbitrage at maturity", unit: "text", value: ({ kind }) => arbitrageWords[kind] },
  { key: "from", header: "From", unit: "percent", unitWords: "%", value: ({ from }) => from },
  { key: "to", header: "To", unit: "percent", unitWords: "%", value: ({ to }) => to },
  { key: "size", header: "By", unit: "plain", unitWords: "slope", value: ({ size }) => size },
];

/** Where the curve allows arbitrage, and why. */
export function ArbitrageTable({ marks }: { marks: readonly Mark[] }) {
  if (marks.length === 0)
    return (
      <Text size="sm" c="dimmed">
        No arbitrage between strikes at maturity.
      </Text>
    );
  return (
    <FigureTable
      name="arbitrage"
      columns={columns}
      rows={marks.map((mark, i) => ({ ...mark, number: i + 1 }))}
      keyOf={({ kind, from }) => `${kind} ${from}`}
      minWidth={360}
    />
  );
}
