"use client";

import { Group, SegmentedControl, Stack, Text } from "@mantine/core";
import dynamic from "next/dynamic";
import { type ReactNode, useMemo, useState } from "react";
import { Figure } from "@/app/_ui/Figure";
import { nameShares, poolTotals, sectorShares } from "@/lib/pools/concentration";
import type { NameInput } from "@/lib/pricing/request";

const SharesChart = dynamic(() => import("./SharesChart").then((loaded) => loaded.SharesChart), {
  ssr: false,
  loading: () => <div style={{ height: 220 }} />,
});
const MOST_BARS = 12;

/** What the pool adds up to, and where it is concentrated. */
export function PoolSummary({ names, currency }: { names: readonly NameInput[]; currency: string }) {
  const [by, setBy] = useState("sector");
  const totals = useMemo(() => poolTotals(names), [names]);
  const shares = useMemo(() => (by === "sector" ? sectorShares(names) : nameShares(names)), [names, by]);
  return (
    <Stack gap="xs">
      <Group gap="xl">
        <Total label="Names">{totals.names}</Total>
        <Total label={`Notional (${currency})`}>
          <Figure value={totals.notional} unit="money" />
        </Total>
        <Total label="Mean recovery (%)">
          <Figure value={totals.recovery} unit="percent" />
        </Total>
        <Total label="Largest name (% of notional)">
          <Figure value={totals.largestShare} unit="percent" />
        </Total>
        <Total label="Effective names (1 / Σ share²)">
          <Figure value={totals.effectiveNames} />
        </Total>
      </Group>
      {names.length > 0 && (
        <>
          <Group gap="sm">
            <Text size="sm">Share of notional by</Text>
            <SegmentedControl
              size="xs"
              aria-label="Share of notional by"
              value={by}
              onChange={setBy}
              data={[
                { value: "sector", label: "Sector" },
                { value: "name", label: "Name" },
              ]}
            />
          </Group>
          <SharesChart shares={shares.slice(0, MOST_BARS)} others={shares.length - MOST_BARS} by={by} />
        </>
      )}
    </Stack>
  );
}

function Total({ label, children }: { label: string; children: ReactNode }) {
  return (
    <div>
      <Text size="xs" c="dimmed">
        {label}
      </Text>
      <Text fw={600} style={{ fontVariantNumeric: "tabular-nums" }}>
        {children}
      </Text>
    </div>
  );
}
