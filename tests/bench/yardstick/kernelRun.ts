import type { RecursionBackend } from "@/lib/quant/kernel/instructions";
import { PANEL_POINTS, Recursion } from "@/lib/quant/kernel/recursion";
import { momentLaw } from "@/lib/quant/portfolio/momentMixture";
import type { KernelCase } from "./kernelCases";

const NEGLIGIBLE = 1e-18;

/** E[min(L, K)] of a case by Loadline's recursion on the case's own grid and rule: [job][date][strike]. */
export function kernelRun(kernelCase: KernelCase, backend: RecursionBackend): () => Float64Array {
  const { amounts, factors, jobs, thresholds, unit, weights } = kernelCase;
  const steps = Int32Array.from(amounts, (amount) => Math.floor(amount + 1e-9));
  const landing = Float64Array.from(
    amounts.flatMap((amount, i) => [1 - (amount - steps[i]!), amount - steps[i]!, 0]),
  );
  const grid = { steps, weights: landing, sizes: Float64Array.from(amounts) };
  return () => {
    const out: number[] = [];
    for (const { rho, strikes } of jobs) {
      const scale = 1 / Math.sqrt(1 - rho);
      const slopes = new Float64Array(amounts.length).fill(Math.sqrt(rho) * scale);
      const breaks = Int32Array.from([0, ...strikes], (strike) => Math.ceil(strike - 1e-9));
      const shape = { top: breaks[breaks.length - 1]! - 1, breaks, negligible: NEGLIGIBLE };
      for (let date = 0; date < thresholds[0]!.length; date++) {
        const scaled = Float64Array.from(thresholds, (row) => row[date]! * scale);
        const recursion = new Recursion({ ...grid, scaled, slopes }, shape, backend);
        const masses = new Float64Array(strikes.length);
        const moments = new Float64Array(strikes.length);
        for (let from = 0; from < factors.length; from += PANEL_POINTS) {
          const panel = recursion.panel(
            Float64Array.from(factors.slice(from, from + PANEL_POINTS)),
            Float64Array.from(weights.slice(from, from + PANEL_POINTS)),
          );
          for (let s = 0; s < strikes.length; s++)
            for (let k = 0; k < PANEL_POINTS; k++) {
              masses[s]! += panel.segmentMasses[s * PANEL_POINTS + k]!;
              moments[s]! += panel.segmentMoments[s * PANEL_POINTS + k]!;
            }
        }
        let below = 0;
        let moment = 0;
        for (const [s, strike] of strikes.entries()) {
          below += masses[s]!;
          moment += moments[s]!;
          out.push(unit * (moment + strike * (1 - below)));
        }
      }
    }
    return Float64Array.from(out);
  };
}

/** The same by cumulants with their own quadrature. */
export function momentRun({ amounts, jobs, thresholds, unit }: KernelCase): () => Float64Array {
  const sizes = Float64Array.from(amounts, (amount) => amount * unit);
  return () =>
    Float64Array.from(
      jobs.flatMap(({ rho, strikes }) =>
        thresholds[0]!.flatMap((_, date) => {
          const loadings = new Float64Array(amounts.length).fill(Math.sqrt(rho));
          const names = { thresholds: Float64Array.from(thresholds, (row) => row[date]!), loadings };
          const inside = strikes.map((strike) => strike * unit);
          const { questions } = momentLaw(sizes, names, inside, 1e-7);
          return inside.map((strike) => questions.between(0, strike));
        }),
      ),
    );
}
