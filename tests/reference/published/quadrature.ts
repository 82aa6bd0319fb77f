import { monotoneInterpolation } from "@/lib/quant/maths/interpolation";
import { gaussLegendre } from "@/lib/quant/maths/quadrature";
import { type GaussRule, gaussHermite, gaussRule } from "../support/gaussRule";
import { type Check, input, inputs, type Published } from "./check";

function upperHalf(
  { nodes, weights }: { nodes: ArrayLike<number>; weights: ArrayLike<number> },
  withZero: boolean,
) {
  const kept = Array.from(nodes, (node, i) => ({
    node: Math.abs(node) < 1e-14 ? 0 : node,
    weight: weights[i]!,
  })).filter(({ node }) => node > 0 || (withZero && node === 0));
  return [...kept.map(({ node }) => node), ...kept.map(({ weight }) => weight)];
}

/** The half-range Hermite rule of Drezner (1978), here by the core's Gauss–Legendre rule. */
function halfRangeHermite(n: number): GaussRule {
  return gaussRule(n, (x) => Math.exp(-x * x), 0, 12);
}

/** Four of the source's factor values, from the middle outwards, and their probabilities. */
function printedFactors(entry: Published): number[] {
  const { nodes, weights } = gaussHermite(input(entry, "M"));
  const shown = [30, 29, 28, 27];
  return [...shown.map((i) => Math.SQRT2 * nodes[i]!), ...shown.map((i) => weights[i]! / Math.sqrt(Math.PI))];
}

/** Slopes of Fritsch & Butland (1984), the source's choice: three-point ends, weighted harmonic means inside. */
function harmonicSlopes(xs: readonly number[], ys: readonly number[]): number[] {
  const widths = xs.slice(1).map((x, i) => x - xs[i]!);
  const secants = widths.map((width, i) => (ys[i + 1]! - ys[i]!) / width);
  const end = (near: number, far: number, first: number, second: number) => {
    const slope = ((2 * near + far) * first - near * second) / (near + far);
    if (slope * first <= 0) return 0;
    return first * second < 0 && Math.abs(slope) > 3 * Math.abs(first) ? 3 * first : slope;
  };
  const last = secants.length - 1;
  return xs.map((_, i) => {
    if (i === 0) return end(widths[0]!, widths[1]!, secants[0]!, secants[1]!);
    if (i === xs.length - 1) return end(widths[last]!, widths[last - 1]!, secants[last]!, secants[last - 1]!);
    const [before, after] = [secants[i - 1]!, secants[i]!];
    if (before * after <= 0) return 0;
    const share = (widths[i - 1]! + 2 * widths[i]!) / (3 * (widths[i - 1]! + widths[i]!));
    return (before * after) / (share * after + (1 - share) * before);
  });
}

/** Rules of quadrature and interpolation. */
export const quadratureChecks: readonly Check[] = [
  { of: /^GH-/, compute: (entry) => upperHalf(gaussHermite(input(entry, "n")), true), agreement: 2e-13 },
  { of: /^HULL-nodes$/, compute: printedFactors },
  { of: /^GL-/, compute: (entry) => upperHalf(gaussLegendre(input(entry, "n")), false), agreement: 1e-15 },
  { of: /^DREZ-5$/, compute: (entry) => halfRangeHermite(input(entry, "n")).weights, agreement: 1e-12 },
  { of: /^DREZ-5x$/, compute: (entry) => halfRangeHermite(input(entry, "n")).nodes, agreement: 1e-12 },
  {
    of: /^PCHIP-NAG$/,
    compute: (entry) => {
      const knots = { arguments: inputs(entry, "x"), values: inputs(entry, "f") };
      const slopes = harmonicSlopes(knots.arguments, knots.values);
      return inputs(entry, "xe").map((x) => monotoneInterpolation(knots, x, slopes));
    },
  },
];
