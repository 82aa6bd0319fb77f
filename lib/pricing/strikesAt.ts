import { type BaseNode, baseCurve } from "../quant/tranche/baseCurve";
import type { BaseCorrelationInput } from "./request";

/** Pieces of the range from 0 to 1 that are searched for a crossing. */
const PIECES = 500;
const BISECTIONS = 50;
/** Edges nearer than this part no piece. */
const NARROW = 1e-9;
/** Two correlations nearer than this are one. */
const SAME = 1e-10;

/**
 * Every strike (fractions of the pool, rising) at which a base curve reads a correlation ρ, or null where it reads ρ all along a piece:
 * beyond its quoted strikes, when it is held flat there. At least one node, in rising order of strike.
 */
export function strikesAt(
  nodes: readonly BaseNode[],
  reading: Pick<BaseCorrelationInput, "interpolation" | "beyond">,
  rho: number,
): readonly number[] | null {
  const curve = baseCurve(nodes, reading);
  const found: number[] = [];
  const edges = [...Array.from({ length: PIECES + 1 }, (_, i) => i / PIECES), ...nodes.map((n) => n.strike)];
  edges.sort((one, other) => one - other);
  for (const [i, high] of edges.entries()) {
    const low = edges[i - 1];
    if (low === undefined || high - low < NARROW) continue;
    const atLow = curve(low) - rho;
    const atHigh = curve(high) - rho;
    const isOn = atHigh <= SAME && atHigh >= -SAME;
    if (isOn && atLow <= SAME && atLow >= -SAME) return null;
    if (isOn) found.push(high);
    else if (atLow < -SAME ? atHigh > SAME : atLow > SAME && atHigh < -SAME)
      found.push(bisected((strike) => curve(strike) - rho, low, high));
  }
  return found;
}

function bisected(miss: (strike: number) => number, low: number, high: number): number {
  const isRising = miss(high) > 0;
  let [from, to] = [low, high];
  for (let i = 0; i < BISECTIONS; i++) {
    const middle = (from + to) / 2;
    if (miss(middle) > 0 === isRising) to = middle;
    else from = middle;
  }
  return (from + to) / 2;
}
