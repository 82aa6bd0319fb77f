import { quickCache } from "@/lib/pricing/quickCache";
import { quickFigures } from "@/lib/pricing/quickFigures";
import { reportOf } from "./priceBench";
import { base, flat, mixedPool, structure } from "./priceCases";
import type { BenchRow } from "./report";
import { type Arm, interleaved, type Timing, timed } from "./rounds";

const ROUNDS = 2;
const STEPS = 2_000;

/** Making the cache of a structure, and one step of a drag on it: a boundary and the correlation both move. */
export async function dragRows(): Promise<BenchRow[]> {
  const one = "one price, ρ 0.3";
  const request = structure(mixedPool(125), flat);
  const onBase = { ...request, correlation: base };
  const cache = quickCache(request)!;
  const baseCache = quickCache(onBase)!;
  const drag = (from: typeof cache, correlationAt: (step: number) => typeof request.correlation): Arm => ({
    run: () => {
      const start = performance.now();
      for (let step = 0; step < STEPS; step++) {
        const boundary = 0.06 + (0.02 * step) / STEPS;
        const tranches = request.tranches.map((tranche, i) =>
          i === 1
            ? { ...tranche, detachment: boundary }
            : i === 2
              ? { ...tranche, attachment: boundary }
              : tranche,
        );
        quickFigures(from, { tranches, correlation: correlationAt(step) });
      }
      return (performance.now() - start) / STEPS;
    },
  });
  const arms = new Map<string, Arm>([
    [one, timed(() => reportOf(request))],
    ["cache built", timed(() => quickCache(request), 1)],
    ["drag step, flat", drag(cache, (step) => ({ kind: "flat", rho: 0.2 + (0.3 * step) / STEPS }))],
    ["drag step, base curve", drag(baseCache, () => base)],
  ]);
  const times = await interleaved(arms, ROUNDS);
  return [...times].map(([name, time]) => ({
    group: "dragging: 125 mixed names, six classes, 20 dates",
    name,
    ...time,
    ratios: ratiosOf(name, time, times.get(one)!),
  }));
}

function ratiosOf(name: string, time: Timing, price: Timing): Record<string, number> {
  return name.startsWith("drag")
    ? { microseconds: 1000 * time.minimum }
    : { "prices of ρ 0.3": time.minimum / price.minimum };
}
