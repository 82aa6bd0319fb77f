import { contractLegs, parSpread } from "../quant/tranche/legs";
import { auditReport } from "./auditSection";
import { baseReport } from "./baseSection";
import { requestHash } from "./canonical";
import { cutLists } from "./checks/sizes";
import { contractReports } from "./contractSection";
import { creditProblems } from "./creditProblems";
import { ENGINE } from "./engine";
import { impliedReports } from "./impliedSection";
import { numericalError } from "./numericalError";
import { pairsReport } from "./pairsSection";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import type { PricingReport, ReportWarning } from "./report";
import { sensitivityReports } from "./sensitivitySection";
import { trancheReport, valuedTranche } from "./trancheSection";
import { type Valuation, valuationOf } from "./valuation";

/** A report, or every problem of the request. */
export type PricingOutcome =
  | { readonly ok: true; readonly report: PricingReport }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

/** Prices a request of unknown origin: checks it, then values it. The same request gives the same bits everywhere. */
export function price(request: unknown): PricingOutcome {
  const raw = cutLists(request);
  const checked = checkRequest(raw);
  const problems: PricingProblem[] = checked.ok ? [] : [...checked.problems];
  const valuation = checked.ok ? valuationOf(checked.request, problems) : curveProblems(raw, problems);
  if (!valuation || problems.length > 0) return { ok: false, problems };
  return { ok: true, report: reportOf(valuation) };
}

/** A refused request still gets its curves tried, where its form allows, so that all problems come at once. */
function curveProblems(raw: unknown, problems: PricingProblem[]): null {
  const found: PricingProblem[] = [];
  for (const problem of creditProblems(raw)) {
    const isCovered = problems.some(
      (known) => known.path === problem.path || known.path.startsWith(`${problem.path}.`),
    );
    if (!isCovered) found.push(problem);
  }
  problems.push(...found);
  return null;
}

function reportOf(valuation: Valuation): PricingReport {
  const { request, portfolio, laws, base } = valuation;
  const include = new Set(request.include ?? []);
  const warnings: ReportWarning[] = [...(base?.warnings ?? [])];
  const last = portfolio.times.length - 1;
  const poolLegs = contractLegs(valuation.times, portfolio.expectedLoss, portfolio.surviving);
  const tranches = request.tranches.map((tranche) => trancheReport(valuation, tranche, warnings));
  const implied = include.has("impliedCorrelation") ? impliedReports(valuation) : null;
  const baseCorrelation = baseReport(valuation, warnings);
  if (request.law?.kind === "largePool") {
    const message =
      "The pool is valued as one class of infinitely many alike names: loss-weighted mean probability, whole loss given default.";
    warnings.push({ code: "largePool", message, subject: "law" });
  }
  const nthToDefault = contractReports(valuation, warnings);
  const pairs = include.has("pairs") ? pairsReport(valuation, warnings) : undefined;
  const sensitivities = include.has("sensitivities") ? sensitivityReports(valuation) : undefined;
  const lossLaw = include.has("lossLaw") ? lossLawOf(valuation, warnings) : undefined;
  const report: PricingReport = {
    format: 1,
    engine: ENGINE,
    requestHash: requestHash(request),
    warnings,
    numericalError: numericalError(valuation),
    pool: {
      names: request.pool.length,
      notional: portfolio.notional,
      expectedLoss: portfolio.expectedLoss[last]!,
      defaultsExpected: portfolio.expectedDefaults,
      protectionLeg: poolLegs.protection,
      annuity: poolLegs.annuity,
      parSpread: parSpread(poolLegs),
      realisedLoss: portfolio.realisedLoss,
      unit: laws.unit,
    },
    tranches: tranches.map((tranche, i) =>
      implied?.[i] ? { ...tranche, impliedCorrelation: implied[i] } : tranche,
    ),
    nthToDefault,
    ...(baseCorrelation ? { baseCorrelation } : {}),
    ...(lossLaw ? { lossLaw } : {}),
    ...(include.has("timeline") ? { timeline: timelineOf(valuation) } : {}),
    ...(sensitivities ? { sensitivities } : {}),
    ...(pairs ? { pairs } : {}),
  };
  return include.has("audit") ? { ...report, audit: auditReport(valuation, report) } : report;
}

function timelineOf(valuation: Valuation): NonNullable<PricingReport["timeline"]> {
  const { portfolio, request } = valuation;
  const profiles = request.tranches.map((tranche) => valuedTranche(valuation, tranche)?.profile.loss ?? null);
  return portfolio.times.slice(1).map((time, k) => ({
    time,
    poolExpectedLoss: portfolio.expectedLoss[k + 1]!,
    trancheExpectedLoss: profiles.map((profile) => profile?.[k + 1] ?? null),
  }));
}

/** Probabilities of the pool's loss at multiples of the unit, realised losses first laid on the same grid. */
function lossLawOf(valuation: Valuation, warnings: ReportWarning[]): PricingReport["lossLaw"] {
  const { laws, portfolio, dependence } = valuation;
  const none = (message: string) => {
    warnings.push({ code: "noLossLaw", message, subject: "lossLaw" });
    return undefined;
  };
  if (dependence.kind === "byStrike") return none("Under a base curve there is no single loss law.");
  const last = portfolio.times.length - 1;
  const { atoms } = laws.whole("loss", last, dependence.dependence, laws.isExact);
  if (!atoms) return none("The large pool has no loss law on a grid.");
  const unit = laws.unit ?? 0.001;
  const top = (portfolio.realisedLoss + atoms.amounts[atoms.amounts.length - 1]!) / unit;
  const count = Math.ceil(top - 1e-7) + 1;
  const probabilities = new Array<number>(Math.max(1, count)).fill(0);
  for (let i = 0; i < atoms.amounts.length; i++) {
    const position = (portfolio.realisedLoss + atoms.amounts[i]!) / unit;
    const lower = Math.min(Math.floor(position + 1e-7), probabilities.length - 1);
    const upper = position - lower < 1e-7 ? 0 : position - lower;
    probabilities[lower]! += (1 - upper) * atoms.masses[i]!;
    if (upper > 0) probabilities[Math.min(lower + 1, probabilities.length - 1)]! += upper * atoms.masses[i]!;
  }
  return { unit: laws.unit ?? unit, probabilities };
}
