"use client";

import { Text } from "@mantine/core";
import {
  CartesianGrid,
  ComposedChart,
  Line,
  ReferenceArea,
  ResponsiveContainer,
  Scatter,
  Tooltip,
  XAxis,
  YAxis,
} from "recharts";
import { fourDigits } from "@/app/_ui/figures";
import { readBaseCurve } from "@/lib/pricing/baseReading";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import type { BaseCorrelationInput } from "@/lib/pricing/request";

type Base = NonNullable<PricingReport["baseCorrelation"]>;

const POINTS = 120;

/** The base curve with its strikes, its reading between and beyond them, the deal's strikes on it, and arbitrage marked. */
export function CurveChart({
  base,
  reading,
  classes,
}: {
  base: Base;
  reading: Pick<BaseCorrelationInput, "interpolation" | "beyond">;
  classes: readonly TrancheReport[];
}) {
  if (base.nodes.length === 0)
    return <Text c="dimmed">No strike was solved: there is no curve to draw.</Text>;
  const strikes = classes.flatMap(({ attachment, detachment }) => [
    attachment,
    detachment < 1 ? detachment : 0,
  ]);
  const reach = Math.min(1, 1.15 * Math.max(...base.nodes.map(({ strike }) => strike), ...strikes));
  const rhoAt = readBaseCurve(base.nodes, reading);
  const first = base.nodes[0]!.strike;
  const last = base.nodes.at(-1)!.strike;
  const curve: { strike: number; rho?: number; beyond?: number }[] = Array.from(
    { length: POINTS + 1 },
    (_, i) => {
      const strike = (reach * i) / POINTS;
      const rho = rhoAt(strike) * 100;
      return { strike: strike * 100, ...(strike < first || strike > last ? { beyond: rho } : { rho }) };
    },
  );
  for (const strike of [first, last].filter((at) => at <= reach)) {
    const rho = rhoAt(strike) * 100;
    curve.push({ strike: strike * 100, rho, beyond: rho });
  }
  curve.sort((one, other) => one.strike - other.strike);
  const nodes = base.nodes.map(({ strike, rho }) => ({ strike: strike * 100, node: rho * 100 }));
  const used = classes.flatMap(({ attachment, detachment, correlation }) => [
    ...(attachment > 0 && correlation.attachment !== null
      ? [{ strike: attachment * 100, used: correlation.attachment * 100 }]
      : []),
    ...(detachment < 1 && correlation.detachment !== null
      ? [{ strike: detachment * 100, used: correlation.detachment * 100 }]
      : []),
  ]);
  return (
    <figure
      style={{ margin: 0 }}
      aria-label="Base correlation curve; its figures are in the tables beside it"
    >
      <Text component="figcaption" size="sm">
        Base correlation (%) by strike (% of pool): the curve (dashed beyond its quoted strikes), its quoted
        strikes (squares), the deal's strikes with the correlation they get (triangles)
        {base.arbitrage.length > 0 ? ", arbitrage shaded and numbered as in the table" : ""}
      </Text>
      <ResponsiveContainer width="100%" height={320} initialDimension={{ width: 520, height: 320 }}>
        <ComposedChart margin={{ top: 8, right: 12, bottom: 4, left: 0 }}>
          <CartesianGrid stroke="light-dark(#d9e4e3, #2a4341)" />
          <XAxis
            dataKey="strike"
            type="number"
            domain={[0, reach * 100]}
            tickFormatter={(value) => fourDigits(value)}
            fontSize={11}
            unit=" %"
          />
          <YAxis domain={[0, 100]} fontSize={11} width={40} unit=" %" />
          {base.arbitrage.map(({ from, to, kind }, i) => (
            <ReferenceArea
              key={`${kind} ${from}`}
              x1={from * 100}
              x2={Math.min(to, reach) * 100}
              fill="light-dark(#c2410c, #fb923c)"
              fillOpacity={0.22}
              label={{ value: String(i + 1), position: "insideTop", fontSize: 11, fill: "currentColor" }}
            />
          ))}
          <Tooltip
            formatter={(value) => `${fourDigits(Number(value))} %`}
            labelFormatter={(at) => `Strike ${fourDigits(Number(at))} %`}
          />
          <Line
            data={curve}
            dataKey="rho"
            name="Curve"
            dot={false}
            stroke="light-dark(#0b6e66, #6cc4bb)"
            strokeWidth={2}
            isAnimationActive={false}
          />
          <Line
            data={curve}
            dataKey="beyond"
            name="Beyond the strikes"
            dot={false}
            stroke="light-dark(#0b6e66, #6cc4bb)"
            strokeWidth={2}
            strokeDasharray="5 4"
            isAnimationActive={false}
          />
          <Scatter
            data={nodes}
            dataKey="node"
            name="Quoted strike"
            shape="square"
            fill="light-dark(#8a6d3b, #d9b97c)"
            isAnimationActive={false}
          />
          <Scatter
            data={used}
            dataKey="used"
            name="Strike of the deal"
            shape="triangle"
            fill="light-dark(#2748a8, #8fb0ff)"
            isAnimationActive={false}
          />
        </ComposedChart>
      </ResponsiveContainer>
    </figure>
  );
}
