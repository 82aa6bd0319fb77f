import { comonotonicPeriod } from "../quant/basket/comonotonicBasket";
import { nthPeriod, type PeriodOutcome } from "../quant/basket/nthToDefault";
import { sectorNthPeriod } from "../quant/basket/sectorNth";
import type { Dependence } from "../quant/portfolio/distribution";
import type { Portfolio } from "../quant/portfolio/portfolio";
import { sectorGroups } from "../quant/portfolio/sectorLaw";
import { contractLegs, parSpread } from "../quant/tranche/legs";
import type { ContractReport, ReportWarning } from "./report";
import type { Valuation } from "./valuation";

/** n-th-to-default contracts: legs as fractions of the equal-weighted name notional. */
export function contractReports(valuation: Valuation, warnings: ReportWarning[]): ContractReport[] {
  const { request, portfolio, names, times, dependence } = valuation;
  const wanted = request.nthToDefault ?? [];
  if (wanted.length === 0) return [];
  if (dependence.kind === "byStrike") {
    const message =
      "n-th-to-default contracts have no figures under a base curve, which gives each strike a correlation and no law of who defaults with whom: price them under a flat, loadings or sector correlation.";
    warnings.push({ code: "noContractFigures", message, subject: "nthToDefault" });
    return [];
  }
  const realised = names.length - portfolio.live.length;
  const most = Math.max(...wanted) - realised;
  const average = portfolio.notional / names.length;
  const payoffs = portfolio.live.map(({ position }) => {
    const name = names[position]!;
    return (name.notional * (1 - name.recovery)) / average;
  });
  const common = payoffs.every((payoff) => payoff === payoffs[0]) ? (payoffs[0] ?? null) : null;
  const period = periodOf(portfolio, dependence.dependence, payoffs, most);
  const dates = portfolio.times.length;
  const reached: Float64Array[] = [new Float64Array(Math.max(most, 0))];
  const paid: Float64Array[] = [];
  for (let j = 1; j < dates && most > 0; j++) {
    const outcome = period(j > 1 ? portfolio.thresholds[j - 1]! : null, portfolio.thresholds[j]!);
    reached.push(outcome.reached);
    paid.push(
      common === null ? outcome.paid : outcome.reached.map((now, n) => common * (now - reached[j - 1]![n]!)),
    );
  }
  return wanted.map((n) => {
    const k = n - realised - 1;
    if (k < 0) return { n, probability: 1, protectionLeg: 0, annuity: 0, parSpread: null };
    const probabilities = reached.map((row) => row[k]!);
    const legs = contractLegs(
      times,
      probabilities,
      probabilities.map((probability) => 1 - probability),
    );
    let protection = 0;
    for (const [j, row] of paid.entries()) protection += times.middleFactors[j]! * row[k]!;
    const contract = { protection, annuity: legs.annuity };
    return {
      n,
      probability: probabilities[dates - 1]!,
      protectionLeg: protection,
      annuity: legs.annuity,
      parSpread: parSpread(contract),
    };
  });
}

type Period = (before: Float64Array | null, after: Float64Array) => PeriodOutcome;

/** How one period of the contracts is worked out under a dependence. */
function periodOf(
  portfolio: Portfolio,
  dependence: Dependence,
  payoffs: readonly number[],
  most: number,
): Period {
  if (dependence.kind === "sector") {
    const correlation = { within: dependence.within, between: dependence.between };
    if (correlation.between >= 1) return (before, after) => comonotonicPeriod(before, after, payoffs, most);
    const groups = sectorGroups(portfolio.live);
    return (before, after) => sectorNthPeriod({ before, after, groups, correlation }, payoffs, most);
  }
  if (dependence.kind === "flat" && dependence.rho === 1)
    return (before, after) => comonotonicPeriod(before, after, payoffs, most);
  const loadings =
    dependence.kind === "flat"
      ? new Float64Array(payoffs.length).fill(Math.sqrt(dependence.rho))
      : Float64Array.from(portfolio.live, (name) => name.loading ?? 0);
  return (before, after) =>
    nthPeriod(
      { before: before && { thresholds: before, loadings }, after: { thresholds: after, loadings } },
      payoffs,
      most,
    );
}
