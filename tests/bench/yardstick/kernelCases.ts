import { normalQuantile } from "@/lib/quant/maths/normal";

/** A pool, dates, a fixed rule over the factor and strikes: what the bare kernel is timed on. */
export interface KernelCase {
  readonly id: string;
  readonly title: string;
  readonly unit: number;
  /** Amounts in steps, ascending. */
  readonly amounts: readonly number[];
  /** [name][date]. */
  readonly thresholds: readonly (readonly number[])[];
  readonly factors: readonly number[];
  readonly weights: readonly number[];
  readonly jobs: readonly { readonly rho: number; readonly strikes: readonly number[] }[];
}

const POINTS = 64;
const STRIKES = [0.03, 0.06, 0.09, 0.12, 0.22];
const BASE = [0.25, 0.35, 0.42, 0.48, 0.62];

/** Numbers in [0, 1) that are the same everywhere. */
export function drawn(seed: number): () => number {
  let state = seed;
  return () => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return state / 4294967296;
  };
}

function trapezoid(): { factors: number[]; weights: number[] } {
  const width = 16 / (POINTS - 1);
  const factors = Array.from({ length: POINTS }, (_, k) => -8 + k * width);
  const raw = factors.map((factor) => Math.exp(-0.5 * factor * factor));
  const total = raw.reduce((sum, weight) => sum + weight, 0);
  return { factors, weights: raw.map((weight) => weight / total) };
}

interface Sketch {
  readonly id: string;
  readonly title: string;
  readonly names: number;
  readonly mixed: boolean;
  readonly unit: number;
  readonly dates: number;
  readonly jobs: readonly { readonly rho: number; readonly strikes: readonly number[] }[];
}

function caseOf({ id, title, names, mixed, unit, dates, jobs }: Sketch): KernelCase {
  const next = drawn(7);
  const shares = Array.from({ length: names }, () => (mixed ? 0.2 + 1.8 * next() : 1));
  const total = shares.reduce((sum, share) => sum + share, 0);
  const drawnNames = shares.map((share) => {
    const recovery = mixed ? 0.2 + 0.4 * next() : 0.4;
    const spread = mixed ? 0.002 * 40 ** next() : 0.01;
    return { amount: (share / total) * (1 - recovery), hazard: spread / (1 - recovery) };
  });
  drawnNames.sort((one, other) => one.amount - other.amount);
  const times = Array.from({ length: dates }, (_, j) => (5 * (j + 1)) / dates);
  return {
    id,
    title,
    unit,
    amounts: drawnNames.map(({ amount }) => {
      const steps = amount / unit;
      return Math.abs(steps - Math.round(steps)) < 1e-9 ? Math.round(steps) : steps;
    }),
    thresholds: drawnNames.map(({ hazard }) =>
      times.map((time) => normalQuantile(-Math.expm1(-hazard * time))),
    ),
    ...trapezoid(),
    jobs: jobs.map(({ rho, strikes }) => ({ rho, strikes: strikes.map((strike) => strike / unit) })),
  };
}

export const KERNEL_CASES: readonly KernelCase[] = [
  caseOf({
    id: "H",
    title: "125 equal names, 20 dates",
    names: 125,
    mixed: false,
    unit: 0.6 / 125,
    dates: 20,
    jobs: [{ rho: 0.3, strikes: STRIKES }],
  }),
  caseOf({
    id: "X",
    title: "125 mixed names, 20 dates, unit 0.1 %, strikes to 30 %",
    names: 125,
    mixed: true,
    unit: 0.001,
    dates: 20,
    jobs: [{ rho: 0.3, strikes: [...STRIKES, 0.3] }],
  }),
  caseOf({
    id: "B",
    title: "the same, five base strikes with correlations of their own",
    names: 125,
    mixed: true,
    unit: 0.001,
    dates: 20,
    jobs: STRIKES.map((strike, i) => ({ rho: BASE[i]!, strikes: [strike] })),
  }),
  caseOf({
    id: "L",
    title: "2,000 mixed names, 4 dates, unit 0.025 %",
    names: 2000,
    mixed: true,
    unit: 0.00025,
    dates: 4,
    jobs: [{ rho: 0.3, strikes: [...STRIKES, 0.3] }],
  }),
];

/** The case as the yardsticks read it: one array of doubles. */
export function caseFile(kernelCase: KernelCase): Float64Array {
  const { amounts, thresholds, factors, weights, jobs, unit } = kernelCase;
  return Float64Array.from([
    amounts.length,
    thresholds[0]!.length,
    factors.length,
    jobs.length,
    unit,
    ...amounts,
    ...thresholds.flat(),
    ...factors,
    ...weights,
    ...jobs.flatMap(({ rho, strikes }) => [rho, strikes.length, ...strikes]),
  ]);
}
