"use client";

import { Alert, Loader, SimpleGrid, Text, Title } from "@mantine/core";
import dynamic from "next/dynamic";
import { useMemo } from "react";
import { Problems } from "@/app/_ui/Problems";
import { Takeable } from "@/app/_ui/Takeable";
import { usePriced } from "@/app/_ui/usePriced";
import { useDeal } from "../_frame/dealContext";
import { ArbitrageTable } from "./ArbitrageTable";
import { Choice } from "./Choice";
import { ImpliedTable } from "./ImpliedTable";
import { MappedStrikes } from "./MappedStrikes";
import { QuotesTable } from "./QuotesTable";

const CurveChart = dynamic(() => import("./CurveChart").then((module) => module.CurveChart), { ssr: false });

/** The room of correlation: the choice, the base curve with its quotes and marks, implied correlations, the mapping. */
export function Correlation() {
  const { request, problems } = useDeal();
  const asked = useMemo(
    () => request && { ...request, include: ["impliedCorrelation" as const], nthToDefault: [] },
    [request],
  );
  const { report, of, isBusy, problems: refused } = usePriced(asked);
  const base = report?.baseCorrelation;
  const shownOf = of?.correlation.kind === "base" ? of.correlation : null;
  return (
    <>
      <Choice />
      <Problems title="Before it can be priced" problems={problems} />
      <Problems title="Why there are no new figures" problems={problems.length > 0 ? [] : refused} />
      {isBusy && (
        <Text size="sm" c="dimmed" role="status">
          <Loader size="xs" /> Working out what is on screen…
        </Text>
      )}
      {report && report.warnings.length > 0 && (
        <Alert color="yellow" title="Warnings">
          {report.warnings.map((warning) => (
            <Text size="sm" key={`${warning.code} ${warning.subject}`}>
              {warning.message}
            </Text>
          ))}
        </Alert>
      )}
      {report && base && shownOf && (
        <>
          {base.stopped && (
            <Alert
              color="red"
              title={`The ladder stops at ${Number((base.stopped.strike * 100).toPrecision(6))} %`}
            >
              {base.stopped.reason} Upfronts that some correlation attains: from{" "}
              {Number((base.stopped.attainable[0] * 100).toPrecision(5))} % to{" "}
              {Number((base.stopped.attainable[1] * 100).toPrecision(5))} %. What was solved below stays in
              use.
            </Alert>
          )}
          <SimpleGrid cols={{ base: 1, md: 2 }}>
            <Takeable name="base correlation">
              <CurveChart base={base} reading={shownOf} classes={report.tranches} />
            </Takeable>
            <div>
              <QuotesTable base={base} quotes={"quotes" in shownOf ? shownOf.quotes : []} />
              <ArbitrageTable marks={base.arbitrage} />
            </div>
          </SimpleGrid>
          <MappedStrikes report={report} reading={shownOf} />
        </>
      )}
      {report && (
        <section>
          <Title order={2} size="h4">
            Implied correlation of each class against its quote
          </Title>
          {report.tranches.some(({ impliedCorrelation }) => impliedCorrelation) ? (
            <ImpliedTable report={report} />
          ) : (
            <Text size="sm" c="dimmed">
              No class has both a coupon and an upfront: only such a quote implies a correlation.
            </Text>
          )}
        </section>
      )}
    </>
  );
}
