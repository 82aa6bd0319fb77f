import { normalQuantile } from "../maths/normal";

/** A deterministic stream of uniforms in (0, 1): the 32-bit generator of D. Steele et al. (SplitMix), fixed seed. */
export function uniformStream(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let z = state;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    z ^= z >>> 16;
    return ((z >>> 0) + 0.5) / 4294967296;
  };
}

/** Mean and standard error of a simulated figure. */
export interface Simulated {
  readonly mean: number;
  readonly standardError: number;
}

/** A pool to simulate at one date. */
export interface SimulatedPool {
  readonly losses: readonly number[];
  readonly thresholds: Float64Array;
  /** Loading on the common factor, on the name's sector factor, and on itself; squares sum to one. */
  readonly common: Float64Array;
  readonly sectoral: Float64Array;
  readonly own: Float64Array;
  readonly sectors: Int32Array;
  readonly sectorCount: number;
}

/** Sums of loss over `paths` draws of the factors and names, from a fixed seed: a second opinion with a stated error. */
export function simulatedLosses(pool: SimulatedPool, paths: number, seed: number): Float64Array {
  const next = uniformStream(seed);
  const sectorFactors = new Float64Array(pool.sectorCount);
  const sums = new Float64Array(paths);
  for (let path = 0; path < paths; path++) {
    const factor = normalQuantile((path + next()) / paths);
    for (let s = 0; s < pool.sectorCount; s++) sectorFactors[s] = normalQuantile(next());
    let loss = 0;
    for (let i = 0; i < pool.losses.length; i++) {
      const systematic = pool.common[i]! * factor + pool.sectoral[i]! * sectorFactors[pool.sectors[i]!]!;
      const asset = systematic + pool.own[i]! * normalQuantile(next());
      if (asset <= pool.thresholds[i]!) loss += pool.losses[i]!;
    }
    sums[path] = loss;
  }
  return sums;
}

/** Mean and standard error of a function of the simulated losses. */
export function simulatedMean(losses: Float64Array, figure: (loss: number) => number): Simulated {
  let sum = 0;
  let squares = 0;
  for (const loss of losses) {
    const value = figure(loss);
    sum += value;
    squares += value * value;
  }
  const mean = sum / losses.length;
  const variance = Math.max(0, squares / losses.length - mean * mean);
  return { mean, standardError: Math.sqrt(variance / losses.length) };
}
