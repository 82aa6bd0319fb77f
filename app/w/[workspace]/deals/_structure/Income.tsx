"use client";

import { Figure } from "@/app/_ui/Figure";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";
import styles from "./income.module.css";

/**
 * What the pool pays at its par spread against what the classes cost at their coupons and upfronts, both as present values
 * in percent of the pool. Null where some class of the whole stack has no figures.
 */
export function incomeOf(report: PricingReport, request: PricingRequest) {
  const { parSpread, annuity } = report.pool;
  const parts = report.tranches.map((tranche) => {
    const asked = request.tranches.find(({ id }) => id === tranche.id);
    if (tranche.annuity === null) return null;
    const thickness = tranche.detachment - tranche.attachment;
    return thickness * ((asked?.running ?? 0) * tranche.annuity + (asked?.upfront ?? 0));
  });
  const covered = report.tranches.reduce(
    (sum, { attachment, detachment }) => sum + detachment - attachment,
    0,
  );
  const income = parSpread === null ? null : parSpread * annuity;
  const cost = parts.some((part) => part === null)
    ? null
    : parts.reduce<number>((sum, part) => sum + (part ?? 0), 0);
  return { income, cost, left: income === null || cost === null ? null : income - cost, covered };
}

/** The pool's income beside the cost of the classes. */
export function Income({ report, request }: { report: PricingReport; request: PricingRequest }) {
  const { income, cost, left, covered } = incomeOf(report, request);
  const lines = [
    ["Pool pays at par, % of pool", income],
    ["Classes cost at coupon and upfront, % of pool", cost],
    ["Left over, % of pool", left],
    ["Pool covered by classes, %", covered],
    ["Pool's expected loss, %", report.pool.expectedLoss],
  ] as const;
  return (
    <dl className={styles.lines}>
      {lines.map(([label, value]) => (
        <div key={label}>
          <dt>{label}</dt>
          <dd>
            <Figure value={value} unit="percent" otherwise="Some class has no figures." />
          </dd>
        </div>
      ))}
      <div>
        <dt>Pool's par spread, bp</dt>
        <dd>
          <Figure value={report.pool.parSpread} unit="basisPoints" />
        </dd>
      </div>
      <div>
        <dt>Defaults expected, names</dt>
        <dd>
          <Figure value={report.pool.defaultsExpected} />
        </dd>
      </div>
      <div>
        <dt>Bound on numerical error, of pool</dt>
        <dd>
          <Figure value={report.numericalError} />
        </dd>
      </div>
    </dl>
  );
}
