import { type BaseNode, baseCurve } from "../quant/tranche/baseCurve";
import type { BaseCorrelationInput } from "./request";

/** ρ(K) as the report's figures read it: between its nodes and beyond them. At least one node, in rising order of strike. */
export function readBaseCurve(
  nodes: readonly BaseNode[],
  reading: Pick<BaseCorrelationInput, "interpolation" | "beyond">,
): (strike: number) => number {
  return baseCurve(nodes, reading);
}
