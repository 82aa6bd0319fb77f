import { amountGrid } from "../quant/portfolio/amountGrid";
import type { Dependence } from "../quant/portfolio/distribution";
import { fourierMasses } from "../quant/risk/fourierAudit";
import { type SimulatedPool, simulatedLosses, simulatedMean } from "../quant/risk/simulationAudit";
import type { PricingReport } from "./report";
import type { Valuation } from "./valuation";

type Audit = NonNullable<PricingReport["audit"]>;
type Figure = Audit["figures"][number];

/** Work beyond which the characteristic function gives way to simulation. */
const FOURIER_WORK = 4e8;
const FOURIER_NODES = 481;
const PATHS = 50_000;
const SEED = 20_260_101;

/** Every tranche's expected loss and probabilities at maturity by a second method, figure by figure. */
export function auditReport(valuation: Valuation, report: PricingReport): Audit {
  const fourier = fourierAudit(valuation, report);
  if (fourier) return fourier;
  const figures: Figure[] = report.tranches.flatMap((tranche, i) => {
    if (tranche.expectedLoss === null) return [];
    const at = (strike: number) => simulatedMinimum(valuation, strike);
    const width = tranche.detachment - tranche.attachment;
    const high = at(tranche.detachment);
    const low = at(tranche.attachment);
    const losses = high.losses.map((loss, k) => (high.capped(loss) - low.capped(low.losses[k]!)) / width);
    const { mean, standardError } = simulatedMean(losses, (value) => value);
    return [figure(`tranches.${i}.expectedLoss`, tranche.expectedLoss, mean, standardError)];
  });
  return { method: `simulation of ${PATHS} stratified paths with a fixed seed`, figures };
}

function figure(path: string, value: number, audited: number, standardError?: number): Figure {
  const difference = value - audited;
  return standardError === undefined
    ? { path, value, audited, difference }
    : { path, value, audited, difference, standardError };
}

function fourierAudit({ laws, portfolio, dependence }: Valuation, report: PricingReport): Audit | null {
  if (
    dependence.kind !== "common" ||
    dependence.dependence.kind === "sector" ||
    !laws.isExact ||
    laws.unit === null
  )
    return null;
  const loadings = loadingsOf(
    dependence.dependence,
    portfolio.live.map((name) => name.loading ?? 0),
  );
  if (loadings.some((loading) => loading * loading > 0.97)) return null;
  const losses = portfolio.live.map((name) => name.loss);
  const grid = amountGrid(losses, 3, laws.unit);
  if (!grid.isExact || grid.top * losses.length * FOURIER_NODES * 0.5 > FOURIER_WORK) return null;
  const last = portfolio.times.length - 1;
  const masses = fourierMasses(grid, portfolio.thresholds[last]!, loadings, FOURIER_NODES - 1);
  const mean = (payoff: (loss: number) => number) => {
    let sum = 0;
    for (let u = masses.length - 1; u >= 0; u--)
      sum += masses[u]! * payoff(portfolio.realisedLoss + u * grid.unit);
    return sum;
  };
  const figures: Figure[] = [
    figure(
      "pool.expectedLoss",
      report.pool.expectedLoss,
      mean((loss) => loss),
    ),
  ];
  for (const [i, tranche] of report.tranches.entries()) {
    const { attachment, detachment, expectedLoss, hitProbability, exhaustionProbability } = tranche;
    const width = detachment - attachment;
    if (expectedLoss === null || hitProbability === null || exhaustionProbability === null) continue;
    const audited = mean((loss) => Math.min(Math.max(loss - attachment, 0), width)) / width;
    figures.push(
      figure(`tranches.${i}.expectedLoss`, expectedLoss, audited),
      figure(
        `tranches.${i}.hitProbability`,
        hitProbability,
        mean((loss) => (loss > attachment + 1e-11 ? 1 : 0)),
      ),
      figure(
        `tranches.${i}.exhaustionProbability`,
        exhaustionProbability,
        mean((loss) => (loss >= detachment - 1e-11 ? 1 : 0)),
      ),
    );
  }
  return { method: "characteristic function on the same lattice, trapezoidal rule over the factor", figures };
}

function loadingsOf(dependence: Dependence, own: readonly number[]): Float64Array {
  return dependence.kind === "flat"
    ? new Float64Array(own.length).fill(Math.sqrt(dependence.rho))
    : Float64Array.from(own);
}

/** Simulated losses at the dependence that a strike is read at, and their cap at the strike. */
function simulatedMinimum({ portfolio, dependence }: Valuation, strike: number) {
  const used: Dependence =
    dependence.kind === "common" ? dependence.dependence : { kind: "flat", rho: dependence.rhoAt(strike) };
  const losses = simulatedLosses(simulatedPool(portfolio, used), PATHS, SEED);
  return { losses, capped: (loss: number) => Math.min(portfolio.realisedLoss + loss, strike) };
}

function simulatedPool(portfolio: Valuation["portfolio"], dependence: Dependence): SimulatedPool {
  const { live, thresholds } = portfolio;
  const names = [...new Set(live.map((name) => name.sector ?? ""))];
  const total = live.map((name) => {
    if (dependence.kind === "flat") return { common: Math.sqrt(dependence.rho), sectoral: 0 };
    if (dependence.kind === "loadings") return { common: name.loading ?? 0, sectoral: 0 };
    return {
      common: Math.sqrt(dependence.between),
      sectoral: Math.sqrt(dependence.within - dependence.between),
    };
  });
  return {
    losses: live.map((name) => name.loss),
    thresholds: thresholds[thresholds.length - 1]!,
    common: Float64Array.from(total, (loading) => loading.common),
    sectoral: Float64Array.from(total, (loading) => loading.sectoral),
    own: Float64Array.from(total, ({ common, sectoral }) =>
      Math.sqrt(Math.max(0, 1 - common * common - sectoral * sectoral)),
    ),
    sectors: Int32Array.from(live, (name) => names.indexOf(name.sector ?? "")),
    sectorCount: names.length,
  };
}
