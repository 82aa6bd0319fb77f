import { price } from "@/lib/pricing/price";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";
import { recursionBackend } from "@/lib/quant/kernel/backend";
import { base, flat, mixedPool, quoted, structure } from "./priceCases";
import type { BenchRow } from "./report";
import { type Arm, interleaved, type Timing, timed } from "./rounds";

const SLOW_ROUNDS = 2;

/** Whole prices: their times against one price, and against the time they spend in the kernel. */
export async function priceRows(rounds: number): Promise<BenchRow[]> {
  const pool = mixedPool(125);
  const upfronts = reportOf(structure(pool, base)).tranches.map((tranche) => tranche.upfrontAtRunning!);
  const implied = structure(pool, flat, ["impliedCorrelation"]);
  const requests = new Map<string, PricingRequest>([
    ["one price, ρ 0.3", structure(pool, flat)],
    ["one price, ρ 0.9", structure(pool, { kind: "flat", rho: 0.9 })],
    ["base-correlation price", structure(pool, base)],
    ["base-correlation price, five quotes calibrated", structure(pool, quoted(upfronts.slice(0, 5)))],
    [
      "implied correlations of six classes",
      { ...implied, tranches: implied.tranches.map((tranche, i) => ({ ...tranche, upfront: upfronts[i]! })) },
    ],
    ["2,000 names", structure(mixedPool(2_000), flat)],
    ["10,000 names", structure(mixedPool(10_000), flat)],
  ]);
  const slow = new Set(["implied correlations of six classes", "10,000 names"]);
  const arms = new Map<string, Arm>(
    [...requests].map(([name, request]) => [
      name,
      timed(() => reportOf(request), slow.has(name) ? SLOW_ROUNDS : undefined),
    ]),
  );
  const kernel = kernelClock();
  arms.set("base-correlation price, the kernel alone", {
    run: () => kernel(() => reportOf(structure(pool, base))),
  });
  const times = await interleaved(arms, rounds);
  return [...times].map(([name, time]) => {
    const request = requests.get(name);
    return {
      group: "prices: mixed names, six classes, 20 dates",
      name,
      ...time,
      ratios: priceRatios(name, time, times),
      ...(request && !slow.has(name) ? { work: workOf(request) } : {}),
    };
  });
}

/** All sensitivities of 125 names against one price, once: by bumps that is a price a name. */
export async function sensitivityRows(): Promise<BenchRow[]> {
  const pool = mixedPool(125);
  const one = "one price, ρ 0.3";
  const arms = new Map<string, Arm>([
    [one, timed(() => reportOf(structure(pool, flat)))],
    ["all sensitivities", timed(() => reportOf(structure(pool, flat, ["sensitivities"])), 1)],
  ]);
  const times = await interleaved(arms, SLOW_ROUNDS);
  return [...times].map(([name, time]) => ({
    group: "sensitivities: 125 mixed names, six classes, 20 dates",
    name,
    ...time,
    ratios: { "prices of ρ 0.3": time.minimum / times.get(one)!.minimum },
  }));
}

function priceRatios(name: string, time: Timing, times: ReadonlyMap<string, Timing>): Record<string, number> {
  const minimum = (other: string) => times.get(other)!.minimum;
  const ratios: Record<string, number> = { "prices of ρ 0.3": time.minimum / minimum("one price, ρ 0.3") };
  if (name === "base-correlation price")
    ratios["to its kernel"] = time.minimum / minimum("base-correlation price, the kernel alone");
  if (name.endsWith("calibrated"))
    ratios["ladder alone, base prices"] =
      (time.minimum - minimum("base-correlation price")) / minimum("base-correlation price");
  if (name === "10,000 names") ratios["to 2,000 names"] = time.minimum / minimum("2,000 names");
  return ratios;
}

function workOf(request: PricingRequest): number {
  recursionBackend().takeWork();
  reportOf(request);
  return recursionBackend().takeWork();
}

export function reportOf(request: PricingRequest): PricingReport {
  const outcome = price(request);
  if (!outcome.ok) throw new Error(outcome.problems.map((problem) => problem.message).join(" "));
  return outcome.report;
}

/** Measures how long a piece of work spends inside the kernel's functions. */
function kernelClock(): (work: () => unknown) => number {
  const backend = recursionBackend();
  return (work) => {
    const { conditional, addNames, collect, moments, cumulants } = backend;
    const originals = { conditional, addNames, collect, moments, cumulants };
    let spent = 0;
    const clocked = Object.entries(originals).map(([name, original]) => [
      name,
      (...values: number[]) => {
        const start = performance.now();
        (original as (...values: number[]) => void)(...values);
        spent += performance.now() - start;
      },
    ]);
    Object.assign(backend, Object.fromEntries(clocked));
    try {
      work();
    } finally {
      Object.assign(backend, originals);
    }
    return spent;
  };
}
