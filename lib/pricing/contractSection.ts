import { comonotonicPeriod } from "../quant/basket/comonotonicBasket";
import { nthPeriod } from "../quant/basket/nthToDefault";
import { contractLegs, parSpread } from "../quant/tranche/legs";
import type { ContractReport, ReportWarning } from "./report";
import type { Valuation } from "./valuation";

/** n-th-to-default contracts: legs as fractions of the equal-weighted name notional. */
export function contractReports(valuation: Valuation, warnings: ReportWarning[]): ContractReport[] {
  const { request, portfolio, names, times, dependence } = valuation;
  const wanted = request.nthToDefault ?? [];
  if (wanted.length === 0) return [];
  if (dependence.kind === "byStrike" || dependence.dependence.kind === "sector") {
    const message =
      "n-th-to-default contracts need a flat correlation or loadings: they have no figures here.";
    warnings.push({ code: "noContractFigures", message, subject: "nthToDefault" });
    return [];
  }
  const common = dependence.dependence;
  const realised = names.length - portfolio.live.length;
  const most = Math.max(...wanted) - realised;
  const average = portfolio.notional / names.length;
  const payoffs = portfolio.live.map(({ position }) => {
    const name = names[position]!;
    return (name.notional * (1 - name.recovery)) / average;
  });
  const rho = common.kind === "flat" ? common.rho : null;
  const loadings =
    rho === null
      ? Float64Array.from(portfolio.live, (name) => name.loading ?? 0)
      : new Float64Array(payoffs.length).fill(Math.sqrt(rho));
  const dates = portfolio.times.length;
  const reached: Float64Array[] = [new Float64Array(Math.max(most, 0))];
  const paid: Float64Array[] = [];
  for (let j = 1; j < dates && most > 0; j++) {
    const after = portfolio.thresholds[j]!;
    const before = j > 1 ? portfolio.thresholds[j - 1]! : null;
    const outcome =
      rho === 1
        ? comonotonicPeriod(before, after, payoffs, most)
        : nthPeriod(
            { before: before && { thresholds: before, loadings }, after: { thresholds: after, loadings } },
            payoffs,
            most,
          );
    reached.push(outcome.reached);
    paid.push(outcome.paid);
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
