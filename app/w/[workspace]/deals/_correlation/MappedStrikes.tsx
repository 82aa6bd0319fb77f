"use client";

import { SimpleGrid, Title } from "@mantine/core";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { PricingReport } from "@/lib/pricing/report";
import type { BaseCorrelationInput } from "@/lib/pricing/request";
import { MappingRails } from "./MappingRails";
import { type MappedLine, mappedLines } from "./mappedLines";
import { mappingWords } from "./words";

const columns: FigureColumn<MappedLine>[] = [
  {
    key: "strike",
    header: "Strike of the deal",
    unit: "percent",
    unitWords: "% of pool",
    value: ({ strike }) => strike,
  },
  {
    key: "quoted",
    header: "Strike of the quoted pool",
    unit: "percent",
    unitWords: "% of that pool",
    value: ({ quoted }) => quoted,
  },
  { key: "rho", header: "Correlation", unit: "percent", unitWords: "%", value: ({ rho }) => rho },
  { key: "why", header: "Remark", unit: "text", value: ({ why }) => why },
];

/** Each strike of the deal with the strike of the quoted pool that the mapping reads for it, and the correlation there. */
export function MappedStrikes({ report, reading }: { report: PricingReport; reading: BaseCorrelationInput }) {
  const lines = mappedLines(report, reading);
  if (lines.length === 0) return null;
  return (
    <section>
      <Title order={2} size="h4">
        From the deal's strikes to the quoted pool's: {mappingWords[reading.mapping].toLowerCase()}
      </Title>
      <SimpleGrid cols={{ base: 1, md: 2 }}>
        <MappingRails lines={lines} />
        <FigureTable
          name="mapped strikes"
          columns={columns}
          rows={lines}
          keyOf={({ strike }) => String(strike)}
          minWidth={360}
        />
      </SimpleGrid>
    </section>
  );
}
