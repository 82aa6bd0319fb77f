"use client";

import { Text, VisuallyHidden } from "@mantine/core";
import { Bar, BarChart, LabelList, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { allDigits, fourDigits } from "@/app/_ui/figures";
import type { Share } from "@/lib/pools/concentration";

const BAR_HEIGHT = 22;

/** Shares of the notional as bars with their figures, largest first; a table says the same to a screen reader. */
export function SharesChart({
  shares,
  others,
  by,
}: {
  shares: readonly Share[];
  others: number;
  by: string;
}) {
  const data = shares.map(({ label, share, names }) => ({
    label,
    percent: Number(allDigits(share, "percent")),
    text: `${fourDigits(share, "percent")}\u00a0%${by === "sector" ? `\u00a0·\u00a0${names}` : ""}`,
  }));
  return (
    <div>
      <div aria-hidden style={{ maxWidth: 760 }}>
        <ResponsiveContainer
          width="100%"
          height={data.length * BAR_HEIGHT + 10}
          initialDimension={{ width: 600, height: data.length * BAR_HEIGHT + 10 }}
        >
          <BarChart
            data={data}
            accessibilityLayer={false}
            layout="vertical"
            margin={{ left: 0, right: 120, top: 0, bottom: 0 }}
          >
            <XAxis type="number" hide domain={[0, "dataMax"]} />
            <YAxis
              type="category"
              dataKey="label"
              width={150}
              interval={0}
              tickLine={false}
              axisLine={false}
              tick={{ fontSize: 12, fill: "currentColor" }}
            />
            <Tooltip formatter={(value) => [`${String(value)} %`, "of the notional"]} />
            <Bar
              dataKey="percent"
              fill="var(--mantine-primary-color-filled)"
              isAnimationActive={false}
              barSize={12}
            >
              <LabelList dataKey="text" position="right" fontSize={12} fill="currentColor" />
            </Bar>
          </BarChart>
        </ResponsiveContainer>
      </div>
      {by === "sector" && (
        <Text size="xs" c="dimmed">
          Share of notional (%) · number of names.
        </Text>
      )}
      {others > 0 && (
        <Text size="xs" c="dimmed">
          The largest {shares.length}; {others} smaller ones not drawn.
        </Text>
      )}
      <VisuallyHidden>
        <table>
          <caption>Share of notional by {by}</caption>
          <tbody>
            {shares.map(({ label, share, names }) => (
              <tr key={label}>
                <th scope="row">{label}</th>
                <td>{allDigits(share, "percent")} %</td>
                <td>{names} names</td>
              </tr>
            ))}
          </tbody>
        </table>
      </VisuallyHidden>
    </div>
  );
}
