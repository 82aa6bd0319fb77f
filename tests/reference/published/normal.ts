import { bivariateNormalCdf } from "@/lib/quant/maths/bivariateNormal";
import { normalCdf, normalQuantile } from "@/lib/quant/maths/normal";
import { type Check, input, inputs } from "./check";

/** Owen's T from Φ₂: Φ₂(−h, 0; ρ) = Φ(−h)/2 + T(h, ρ/√(1 − ρ²)), h > 0 (Owen 1956). */
function owenT(h: number, a: number): number {
  return bivariateNormalCdf(-h, 0, a / Math.sqrt(1 + a * a)) - 0.5 * normalCdf(-h);
}

/** Tables of the normal law, univariate and bivariate. */
export const normalChecks: readonly Check[] = [
  {
    of: /^BVN-/,
    compute: (entry) => [bivariateNormalCdf(input(entry, "x"), input(entry, "y"), input(entry, "rho"))],
  },
  {
    of: /^HAUG-/,
    compute: (entry) => [bivariateNormalCdf(input(entry, "a"), input(entry, "b"), input(entry, "rho"))],
  },
  { of: /^OWEN-/, compute: (entry) => [owenT(input(entry, "h"), input(entry, "a"))] },
  { of: /^NCDF$/, compute: (entry) => inputs(entry, "x").map(normalCdf), agreement: 1e-15 },
  { of: /^NINV$/, compute: (entry) => inputs(entry, "p").map(normalQuantile), agreement: 5e-13 },
];
