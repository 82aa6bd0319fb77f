"use client";

import { CartesianGrid, Line, LineChart, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { allDigits, fourDigits } from "@/app/_ui/figures";
import type { DiscountPoint } from "@/lib/pricing/marketTable";

const HEIGHT = 180;

/** Zero rates by years; the table below says the same. */
export function ZeroRateChart({ points }: { points: readonly DiscountPoint[] }) {
  const data = points.map(({ years, zeroRate }) => ({
    years,
    percent: Number(allDigits(zeroRate, "percent")),
  }));
  return (
    <div aria-hidden>
      <ResponsiveContainer width="100%" height={HEIGHT} initialDimension={{ width: 480, height: HEIGHT }}>
        <LineChart data={data} accessibilityLayer={false} margin={{ left: 0, right: 12, top: 8, bottom: 16 }}>
          <CartesianGrid strokeOpacity={0.25} />
          <XAxis
            dataKey="years"
            type="number"
            domain={[0, "dataMax"]}
            tick={{ fontSize: 12, fill: "currentColor" }}
            label={{
              value: "years",
              position: "insideBottom",
              offset: -8,
              fontSize: 12,
              fill: "currentColor",
            }}
          />
          <YAxis
            width={56}
            domain={[
              (least: number) => Math.floor(4 * least - 0.5) / 4,
              (most: number) => Math.ceil(4 * most + 0.5) / 4,
            ]}
            tick={{ fontSize: 12, fill: "currentColor" }}
            tickFormatter={(value: number) => fourDigits(value)}
            label={{
              value: "zero rate (%)",
              angle: -90,
              position: "left",
              offset: -12,
              style: { textAnchor: "middle" },
              fontSize: 12,
              fill: "currentColor",
            }}
          />
          <Tooltip
            formatter={(value) => [`${String(value)} %`, "zero rate"]}
            labelFormatter={(t) => `${t} years`}
          />
          <Line
            dataKey="percent"
            stroke="var(--mantine-primary-color-filled)"
            strokeWidth={2}
            isAnimationActive={false}
          />
        </LineChart>
      </ResponsiveContainer>
    </div>
  );
}
