"use client";

import { SimpleGrid, Stack, Table, Text, Title } from "@mantine/core";
import dynamic from "next/dynamic";
import { Figure } from "@/app/_ui/Figure";
import { readMarket, SHOWN_MATURITY } from "@/lib/markets/check";
import type { FormReading } from "@/lib/markets/form";

const ZeroRateChart = dynamic(() => import("./ZeroRateChart").then((loaded) => loaded.ZeroRateChart), {
  ssr: false,
  loading: () => <div style={{ height: 180 }} />,
});

/** What the pricing core reads from the market: discount factors, zero rates, and the payments of one contract. */
export function MarketPreview({ reading }: { reading: FormReading }) {
  const table = reading.ok ? readMarket(reading.pricingDate, reading.content) : null;
  if (!table?.ok) {
    return <Text c="dimmed">Discount factors and payment dates appear here once every field fits.</Text>;
  }
  return (
    <Stack gap="sm">
      <Title order={2} size="h4">
        As the pricing core reads it
      </Title>
      <ZeroRateChart points={table.points} />
      <SimpleGrid cols={{ base: 1, sm: 2 }}>
        <Table
          verticalSpacing={2}
          aria-label="Discount factors"
          style={{ fontVariantNumeric: "tabular-nums" }}
        >
          <Table.Thead>
            <Table.Tr>
              <Table.Th ta="right">Years</Table.Th>
              <Table.Th ta="right">Discount factor</Table.Th>
              <Table.Th ta="right">Zero rate (%)</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {table.points.map(({ years, discountFactor, zeroRate }) => (
              <Table.Tr key={years}>
                <Table.Td ta="right">{years}</Table.Td>
                <Table.Td ta="right">
                  <Figure value={discountFactor} />
                </Table.Td>
                <Table.Td ta="right">
                  <Figure value={zeroRate} unit="percent" />
                </Table.Td>
              </Table.Tr>
            ))}
          </Table.Tbody>
        </Table>
        {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reachable by keyboard */}
        <section aria-label="Payments, scrollable" tabIndex={0} style={{ maxHeight: 300, overflow: "auto" }}>
          <Table verticalSpacing={2} aria-label="Payments" style={{ fontVariantNumeric: "tabular-nums" }}>
            <Table.Thead>
              <Table.Tr>
                <Table.Th ta="right">Payment</Table.Th>
                <Table.Th ta="right">Accrual (years)</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {table.payments.map(({ years, date, accrual }) => (
                <Table.Tr key={years}>
                  <Table.Td ta="right">{date ?? <Figure value={years} unit="years" />}</Table.Td>
                  <Table.Td ta="right">
                    <Figure value={accrual} />
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </section>
      </SimpleGrid>
      <Text size="xs" c="dimmed">
        Payments of a contract that ends in {SHOWN_MATURITY} years' time.
      </Text>
    </Stack>
  );
}
