"use client";

import { Button, Group, Title } from "@mantine/core";
import Link from "next/link";
import { Figure } from "@/app/_ui/Figure";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { Operations } from "@/lib/operations";
import type { TrancheReport } from "@/lib/pricing/report";
import { hiddenTrancheColumns, trancheColumns } from "../../deals/_report/trancheColumns";
import { Assumptions } from "./Assumptions";
import { SheetHull } from "./SheetHull";
import styles from "./sheet.module.css";

type Run = Operations["runs.open"]["output"];
type Review = Operations["reviews.list"]["output"]["reviews"][number];

/** One run on paper, readable in black and white, A4 or letter. */
export function Sheet({
  workspaceId,
  deal,
  run,
  reviews,
}: {
  workspaceId: string;
  deal: { id: string; name: string };
  run: Run;
  reviews: readonly Review[];
}) {
  const { report, request } = run;
  const currency = request.currency ?? "EUR";
  const nameOf = (id: string) => run.classNames[id] ?? id;
  const columns: FigureColumn<TrancheReport>[] = [
    { key: "name", header: "Class", unit: "text", value: ({ id }) => nameOf(id) },
    {
      key: "attachment",
      header: "From",
      unit: "percent",
      unitWords: "%",
      value: ({ attachment }) => attachment,
    },
    {
      key: "detachment",
      header: "To",
      unit: "percent",
      unitWords: "%",
      value: ({ detachment }) => detachment,
    },
    ...trancheColumns(currency, "class").filter(({ key }) => !hiddenTrancheColumns.includes(key)),
  ];
  return (
    <article className={styles.sheet}>
      <Group justify="space-between" className="screenOnly" mb="md">
        <Link href={`/w/${workspaceId}/deals/${deal.id}/runs/${run.id}`}>Back to the run</Link>
        <Button size="compact-sm" onClick={() => window.print()}>
          Print
        </Button>
      </Group>
      <Title order={1} size="h3">
        {deal.name}: run {run.number}
      </Title>
      <p>
        Priced {run.at.slice(0, 16).replace("T", " ")} UTC by {run.engine}; request{" "}
        <code>{run.requestHash}</code>
        {run.note && `; ${run.note}`}.{" "}
        {run.isCurrent
          ? "It stands for the deal as it is now."
          : "The deal, its pool or its market has changed since."}
      </p>
      <h2>Classes</h2>
      <table>
        <thead>
          <tr>
            {columns.map(({ key, header, unitWords }) => (
              <th key={key}>
                {header}
                {unitWords && <small>{unitWords}</small>}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {report.tranches.map((row) => (
            <tr key={row.id}>
              {columns.map((column) => {
                const value = column.value(row);
                return (
                  <td key={column.key} className={column.unit === "text" ? undefined : styles.number}>
                    {column.unit === "text" || typeof value === "string" ? (
                      value
                    ) : (
                      <Figure value={value} unit={column.unit} />
                    )}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
      <SheetHull report={report} nameOf={nameOf} />
      {report.nthToDefault.length > 0 && (
        <>
          <h2>n-th to default</h2>
          <table>
            <thead>
              <tr>
                <th>n</th>
                <th>
                  At least n defaults<small>%</small>
                </th>
                <th>
                  Par spread<small>bp</small>
                </th>
                <th>
                  Protection leg<small>% of a name</small>
                </th>
                <th>
                  Annuity<small>years</small>
                </th>
              </tr>
            </thead>
            <tbody>
              {report.nthToDefault.map((row) => (
                <tr key={row.n}>
                  <td>{row.n}</td>
                  <td className={styles.number}>
                    <Figure value={row.probability} unit="percent" />
                  </td>
                  <td className={styles.number}>
                    <Figure value={row.parSpread} unit="basisPoints" />
                  </td>
                  <td className={styles.number}>
                    <Figure value={row.protectionLeg} unit="percent" />
                  </td>
                  <td className={styles.number}>
                    <Figure value={row.annuity} unit="years" />
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </>
      )}
      <Assumptions request={request} report={report} />
      {report.warnings.length > 0 && (
        <>
          <h2>Warnings</h2>
          <ul>
            {report.warnings.map((warning) => (
              <li key={`${warning.code} ${warning.subject}`}>{warning.message}</li>
            ))}
          </ul>
        </>
      )}
      <h2>Sign-off of these numbers</h2>
      {reviews.length === 0 && <p>None was asked for.</p>}
      <ul>
        {reviews.flatMap((review) => [
          <li key={review.id}>
            Asked by {review.askedBy}, {review.askedAt.slice(0, 10)}; {review.needed} must sign; now{" "}
            {
              { open: "open", signed: "signed off", sentBack: "sent back", withdrawn: "withdrawn" }[
                review.state
              ]
            }
            .
          </li>,
          ...review.answers.map(({ by, answer, reason, at }) => (
            <li key={`${review.id} ${by}`}>
              {by} {answer === "signed" ? "signed off" : "sent it back"}, {at.slice(0, 10)}
              {reason && `: ${reason}`}
            </li>
          )),
        ])}
      </ul>
    </article>
  );
}
