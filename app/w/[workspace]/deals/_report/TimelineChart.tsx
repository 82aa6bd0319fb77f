"use client";

import { Text } from "@mantine/core";
import { CartesianGrid, Legend, Line, LineChart, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { fourDigits } from "@/app/_ui/figures";
import type { PricingReport } from "@/lib/pricing/report";

const strokes = ["#0b7285", "#e8590c", "#5f3dc4", "#2b8a3e", "#c2255c", "#495057"];
const dashes = ["0", "6 3", "2 3", "8 3 2 3", "4 4", "1 3"];

/** Expected loss of pool and classes over time; lines differ in dash as well as in colour. */
export function TimelineChart({
  timeline,
  names,
}: {
  timeline: NonNullable<PricingReport["timeline"]>;
  names: readonly string[];
}) {
  const data = timeline.map((row) => ({
    time: Number(row.time.toFixed(2)),
    Pool: row.poolExpectedLoss * 100,
    ...Object.fromEntries(
      names.map((name, i) => [
        name,
        row.trancheExpectedLoss[i] === null ? undefined : row.trancheExpectedLoss[i]! * 100,
      ]),
    ),
  }));
  return (
    <figure style={{ margin: 0 }}>
      <Text component="figcaption" size="sm">
        Expected loss (% of each one's own notional) over time (years)
      </Text>
      <ResponsiveContainer width="100%" height={260} initialDimension={{ width: 480, height: 260 }}>
        <LineChart data={data}>
          <CartesianGrid strokeOpacity={0.2} />
          <XAxis dataKey="time" type="number" domain={[0, "dataMax"]} fontSize={11} />
          <YAxis fontSize={11} width={44} />
          <Tooltip
            formatter={(value) => `${fourDigits(Number(value))} %`}
            labelFormatter={(label) => `${label} years`}
          />
          <Legend />
          {["Pool", ...names].map((name, i) => (
            <Line
              key={name}
              dataKey={name}
              dot={false}
              isAnimationActive={false}
              stroke={strokes[i % strokes.length]!}
              strokeDasharray={dashes[i % dashes.length]!}
            />
          ))}
        </LineChart>
      </ResponsiveContainer>
    </figure>
  );
}
