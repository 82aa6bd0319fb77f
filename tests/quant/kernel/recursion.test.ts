import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { compiledKernelFile, KERNEL_FILE } from "@/lib/compute/kernelModule";
import { wasmBackend } from "@/lib/quant/kernel/backend";
import { PANEL_POINTS, Recursion, type RecursionNames } from "@/lib/quant/kernel/recursion";
import { twinBackend } from "@/lib/quant/kernel/twin";
import { normalCdf } from "@/lib/quant/maths/normal";

const drawn = (seed: number) => {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return state / 4294967296;
  };
};

/** Names with one, two and three landing points, some certain, some impossible, some with negative loadings. */
function someNames(count: number, seed: number): RecursionNames {
  const next = drawn(seed);
  const steps = new Int32Array(count);
  const weights = new Float64Array(3 * count);
  const sizes = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    steps[i] = Math.floor(9 * next());
    const kind = Math.floor(3 * next());
    const part = next() - 0.5;
    const shares =
      kind === 0
        ? [1, 0, 0]
        : kind === 1
          ? [0.5 - part, 0.5 + part, 0]
          : [(part * part - part) / 2, 1 - part * part, (part * part + part) / 2];
    weights.set(shares, 3 * i);
    sizes[i] = steps[i]! + shares[1]! + 2 * shares[2]!;
  }
  const scaled = Float64Array.from({ length: count }, (_, i) =>
    i % 17 === 3 ? Number.POSITIVE_INFINITY : i % 19 === 5 ? Number.NEGATIVE_INFINITY : 3 * next() - 3,
  );
  const slopes = Float64Array.from({ length: count }, () => 1.4 * next() - 0.2);
  return { steps, weights, sizes, scaled, slopes };
}

const factors = Float64Array.from({ length: PANEL_POINTS }, (_, k) => -6 + 0.7 * k);
const weights = Float64Array.from(factors, (factor) => 0.1 * Math.exp(-0.5 * factor * factor));

/** The law of one factor value by adding names to a dense array: the definition, nothing trimmed. */
function plainLaw(names: RecursionNames, factor: number, weight: number, length: number): Float64Array {
  let law = new Float64Array(length);
  law[0] = weight;
  for (let i = 0; i < names.steps.length; i++) {
    const p = normalCdf(names.scaled[i]! - names.slopes[i]! * factor);
    const next = law.map((mass) => (1 - p) * mass);
    for (let u = 0; u < length; u++)
      for (let landing = 0; landing < 3; landing++) {
        const to = u + names.steps[i]! + landing;
        if (to < length) next[to]! += p * names.weights[3 * i + landing]! * law[u]!;
      }
    law = next;
  }
  return law;
}

describe("LAW: the compiled recursion", () => {
  it("is the AssemblyScript source compiled: the committed module is what the compiler makes of it", async () => {
    expect(readFileSync(KERNEL_FILE, "utf8")).toBe(await compiledKernelFile());
  });

  for (const [count, top] of [
    [1, 3],
    [40, 500],
    [125, 60],
    [700, 4000],
  ] as const) {
    it(`gives the bits of its twin in TypeScript: ${count} names cut at ${top} steps`, () => {
      const names = someNames(count, count);
      const shape = { top, breaks: Int32Array.from([0, 2, 2, top]), negligible: 1e-25 };
      const compiled = new Recursion(names, shape, wasmBackend()!);
      const twin = new Recursion(names, shape, twinBackend());
      expect(compiled.panel(factors, weights)).toEqual(twin.panel(factors, weights));
      expect(compiled.panel(factors, weights)).toEqual(twin.panel(factors, weights));
      expect(compiled.momentsAt(-1.3, 0.4)).toEqual(twin.momentsAt(-1.3, 0.4));
      expect(compiled.cumulantsAt(-1.3, 0.4)).toEqual(twin.cumulantsAt(-1.3, 0.4));
    });
  }

  it("is the definition to 1e-14, with mass above the top in the overflow: 60 names, 16 factor values", () => {
    const names = someNames(60, 5);
    const top = 90;
    const length = 700;
    const { low, masses, overflow, segmentMasses } = new Recursion(names, {
      top,
      breaks: Int32Array.from([0, 30]),
      negligible: 1e-25,
    }).panel(factors, weights);
    const total = new Float64Array(length);
    for (const [k, factor] of factors.entries()) {
      const law = plainLaw(names, factor, weights[k]!, length);
      for (let u = 0; u < length; u++) total[u]! += law[u]!;
      const above = law.slice(top + 1).reduce((sum, mass) => sum + mass, 0);
      expect(Math.abs(overflow[k]! - above)).toBeLessThanOrEqual(1e-14);
      const early = law.slice(0, 30).reduce((sum, mass) => sum + mass, 0);
      expect(Math.abs(segmentMasses[k]! - early)).toBeLessThanOrEqual(1e-14);
    }
    for (let u = 0; u <= top; u++)
      expect(Math.abs((masses[u - low] ?? 0) - total[u]!)).toBeLessThanOrEqual(1e-14);
  });

  it("refuses names that another load has pushed out of its memory", () => {
    const shape = { top: 10, breaks: Int32Array.from([0]), negligible: 1e-25 };
    const first = new Recursion(someNames(3, 1), shape);
    new Recursion(someNames(3, 2), shape);
    expect(() => first.panel(factors, weights)).toThrow("left the kernel");
  });
});
