"use client";

import { SimpleGrid } from "@mantine/core";
import { Bar, BarChart, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { fourDigits } from "@/app/_ui/figures";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { ContractReport } from "@/lib/pricing/report";

const columns: FigureColumn<ContractReport>[] = [
  { key: "n", header: "n", unit: "plain", value: ({ n }) => n },
  {
    key: "probability",
    header: "At least n defaults",
    unit: "percent",
    unitWords: "%",
    value: (row) => row.probability,
  },
  {
    key: "parSpread",
    header: "Par spread",
    unit: "basisPoints",
    unitWords: "bp",
    value: (row) => row.parSpread,
  },
  {
    key: "protectionLeg",
    header: "Protection leg",
    unit: "percent",
    unitWords: "% of a name",
    value: (row) => row.protectionLeg,
  },
  { key: "annuity", header: "Annuity", unit: "years", unitWords: "years", value: (row) => row.annuity },
];

/** The contracts with their figures, and the chance of each as bars. */
export function Contracts({ contracts }: { contracts: readonly ContractReport[] }) {
  const bars = contracts.map(({ n, probability }) => ({ n: String(n), probability: probability * 100 }));
  return (
    <SimpleGrid cols={{ base: 1, md: 2 }}>
      <FigureTable
        name="contracts"
        columns={columns}
        rows={contracts}
        keyOf={({ n }) => String(n)}
        minWidth={420}
      />
      <figure
        style={{ margin: 0 }}
        aria-label="Chance of at least n defaults; its figures are in the table beside it"
      >
        <ResponsiveContainer width="100%" height={220} initialDimension={{ width: 480, height: 220 }}>
          <BarChart data={bars}>
            <XAxis dataKey="n" fontSize={11} />
            <YAxis fontSize={11} width={44} unit=" %" />
            <Tooltip
              formatter={(value) => [`${fourDigits(Number(value))} %`, "At least n defaults"]}
              labelFormatter={(n) => `n = ${n}`}
            />
            <Bar dataKey="probability" fill="light-dark(#2f6f6b, #6fb9b2)" isAnimationActive={false} />
          </BarChart>
        </ResponsiveContainer>
      </figure>
    </SimpleGrid>
  );
}
