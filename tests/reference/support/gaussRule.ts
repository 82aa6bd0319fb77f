import { gaussLegendre } from "@/lib/quant/maths/quadrature";

/** A Gauss rule of another weight than the core needs: published examples are bound to their authors' rules. */
export interface GaussRule {
  readonly nodes: number[];
  readonly weights: number[];
}

interface Recurrence {
  readonly shifts: number[];
  readonly scales: number[];
  readonly mass: number;
}

/**
 * Gauss rule for a weight on [low, high]: recurrence by the discretised Stieltjes procedure on panels of the core's
 * Gauss–Legendre rule, nodes by bisection on Sturm counts, weights from the orthonormal polynomials (Gautschi 2004).
 */
export function gaussRule(n: number, weight: (x: number) => number, low: number, high: number): GaussRule {
  const recurrence = stieltjes(n, weight, low, high);
  const nodes = Array.from({ length: n }, (_, k) => nodeOf(recurrence, k, low, high));
  const weights = nodes.map((x) => 1 / orthonormalSquares(recurrence, x));
  return { nodes, weights };
}

/** Gauss–Hermite: weight exp(−x²) on the whole line. */
export function gaussHermite(n: number): GaussRule {
  return gaussRule(n, (x) => Math.exp(-x * x), -14, 14);
}

function stieltjes(n: number, weight: (x: number) => number, low: number, high: number): Recurrence {
  const { nodes, weights } = gaussLegendre(48);
  const panels = 24;
  const half = (high - low) / (2 * panels);
  const xs: number[] = [];
  const ws: number[] = [];
  for (let panel = 0; panel < panels; panel++) {
    for (const [i, node] of nodes.entries()) {
      const x = low + half * (2 * panel + 1 + node);
      xs.push(x);
      ws.push(half * weights[i]! * weight(x));
    }
  }
  const mass = ws.reduce((sum, w) => sum + w, 0);
  let before = xs.map(() => 0);
  let here = xs.map(() => 1 / Math.sqrt(mass));
  const shifts: number[] = [];
  const scales: number[] = [];
  for (let k = 0; k < n; k++) {
    const shift = here.reduce((sum, p, i) => sum + ws[i]! * xs[i]! * p * p, 0);
    const last = scales[k - 1] ?? 0;
    const raw = here.map((p, i) => (xs[i]! - shift) * p - last * before[i]!);
    const scale = Math.sqrt(raw.reduce((sum, p, i) => sum + ws[i]! * p * p, 0));
    shifts.push(shift);
    scales.push(scale);
    before = here;
    here = raw.map((p) => p / scale);
  }
  return { shifts, scales, mass };
}

function nodeOf({ shifts, scales }: Recurrence, k: number, low: number, high: number): number {
  const below = (x: number) => {
    let count = 0;
    let pivot = 1;
    for (const [j, shift] of shifts.entries()) {
      const scale = j === 0 ? 0 : scales[j - 1]!;
      pivot = shift - x - (scale * scale) / pivot;
      if (pivot === 0) pivot = 1e-300;
      if (pivot < 0) count++;
    }
    return count;
  };
  let [from, to] = [low, high];
  for (let step = 0; step < 90; step++) {
    const middle = 0.5 * (from + to);
    if (below(middle) > k) to = middle;
    else from = middle;
  }
  return 0.5 * (from + to);
}

function orthonormalSquares({ shifts, scales, mass }: Recurrence, x: number): number {
  let before = 0;
  let here = 1 / Math.sqrt(mass);
  let sum = 0;
  for (const [k, shift] of shifts.entries()) {
    sum += here * here;
    const next = ((x - shift) * here - (scales[k - 1] ?? 0) * before) / scales[k]!;
    before = here;
    here = next;
  }
  return sum;
}

/** The node nearest to a printed, rounded factor among those of a source's rule for the standard normal law. */
export function printedFactor(points: number, rounded: number): number {
  const factors = gaussHermite(points).nodes.map((node) => Math.SQRT2 * node);
  return factors.reduce((best, factor) =>
    Math.abs(factor - rounded) < Math.abs(best - rounded) ? factor : best,
  );
}
