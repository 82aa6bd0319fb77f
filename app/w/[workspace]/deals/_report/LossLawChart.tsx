"use client";

import { Text } from "@mantine/core";
import { Bar, BarChart, ReferenceLine, ResponsiveContainer, Tooltip, XAxis, YAxis } from "recharts";
import { fourDigits } from "@/app/_ui/figures";
import type { PricingReport } from "@/lib/pricing/report";

const BARS = 90;

/** The loss law at maturity, in bars of equal width up to where 99.9 % of it lies, with the attachment points drawn in. */
export function LossLawChart({
  law,
  marks,
}: {
  law: NonNullable<PricingReport["lossLaw"]>;
  marks: readonly { name: string; attachment: number; detachment: number }[];
}) {
  const { unit, probabilities } = law;
  const step = unit ?? 0.001;
  let top = probabilities.length;
  let above = 0;
  while (top > 1 && above + probabilities[top - 1]! < 0.001) above += probabilities[--top]!;
  const perBar = Math.max(1, Math.ceil(top / BARS));
  const data = Array.from({ length: Math.ceil(top / perBar) }, (_, k) => ({
    loss: Number((k * perBar * step * 100).toPrecision(6)),
    probability: probabilities.slice(k * perBar, (k + 1) * perBar).reduce((sum, mass) => sum + mass, 0) * 100,
  }));
  const end = data[data.length - 1]?.loss ?? 0;
  return (
    <figure style={{ margin: 0 }}>
      <Text component="figcaption" size="sm">
        Loss law at maturity: probability (%) of a pool loss (%), shown up to its 99.9 % point
      </Text>
      <ResponsiveContainer width="100%" height={260} initialDimension={{ width: 480, height: 260 }}>
        <BarChart data={data} barCategoryGap={0}>
          <XAxis
            dataKey="loss"
            type="number"
            domain={[0, Math.max(end, 0.1)]}
            unit=" %"
            tickFormatter={(value) => fourDigits(value / 100, "percent")}
            fontSize={11}
          />
          <YAxis fontSize={11} width={44} />
          <Tooltip
            formatter={(value) => [`${fourDigits(Number(value))} %`, "Probability"]}
            labelFormatter={(label) => `Loss ${label} %`}
          />
          <Bar dataKey="probability" fill="var(--mantine-color-teal-6)" isAnimationActive={false} />
          {marks
            .filter((mark) => mark.attachment > 0 && mark.attachment * 100 <= end)
            .map((mark) => (
              <ReferenceLine
                key={mark.name}
                x={mark.attachment * 100}
                stroke="currentColor"
                strokeDasharray="4 3"
                label={{ value: mark.name, fontSize: 11, fill: "currentColor", position: "insideTopRight" }}
              />
            ))}
        </BarChart>
      </ResponsiveContainer>
    </figure>
  );
}
