import { Figure } from "@/app/_ui/Figure";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";

/** What the figures rest on: pool, market, dates, correlation, law, and how exact they are. */
export function Assumptions({ request, report }: { request: PricingRequest; report: PricingReport }) {
  const { schedule, correlation, discount } = request;
  const dates =
    schedule.kind === "even"
      ? `${schedule.years} years, ${schedule.perYear} payments a year, no calendar`
      : `to ${schedule.maturity}, quarterly standard dates, ${schedule.holidays.length} holidays`;
  const together = {
    flat: () => (correlation.kind === "flat" ? `flat asset correlation ${percent(correlation.rho)}` : ""),
    loadings: () => "each name's own loading",
    sector: () =>
      correlation.kind === "sector"
        ? `asset correlation ${percent(correlation.within)} within and ${percent(correlation.between)} across sectors`
        : "",
    base: () => "base correlation curve",
  }[correlation.kind]();
  return (
    <>
      <h2>What they rest on</h2>
      <ul>
        <li>
          Pool: {report.pool.names} names, notional <Figure value={report.pool.notional} unit="money" />{" "}
          {request.currency ?? "EUR"}, expected loss{" "}
          <Figure value={report.pool.expectedLoss} unit="percent" /> %, par spread{" "}
          <Figure value={report.pool.parSpread} unit="basisPoints" /> bp, realised loss{" "}
          <Figure value={report.pool.realisedLoss} unit="percent" /> %.
        </li>
        <li>
          Pricing date {request.pricingDate ?? "none"}; {dates}; discount curve{" "}
          {discount.kind === "flat"
            ? `flat at ${percent(discount.rate)}`
            : `of ${discount.nodes.length} ${discount.kind} nodes`}
          .
        </li>
        <li>
          One-factor Gaussian copula, {together};{" "}
          {request.law?.kind === "largePool" ? "large pool as one class" : "finite pool"}.
        </li>
        <li>
          Bound on the numerical error of the expected loss below a strike:{" "}
          <Figure value={report.numericalError} /> of the pool. Values are to the protection seller.
        </li>
      </ul>
    </>
  );
}

function percent(value: number): string {
  return `${Number((value * 100).toPrecision(6))} %`;
}
