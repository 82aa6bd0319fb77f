"use client";

import { Alert, Button, Group, SimpleGrid, Stack, Table, Text, Title } from "@mantine/core";
import dynamic from "next/dynamic";
import Link from "next/link";
import { Figure } from "@/app/_ui/Figure";
import type { FigureUnit } from "@/app/_ui/figures";
import { saveFile } from "@/app/_ui/saveFile";
import { Takeable } from "@/app/_ui/Takeable";
import type { ClassText } from "@/lib/deals/form";
import type { Operations } from "@/lib/operations";
import { textOf } from "@/lib/platform/typed";
import type { PricingReport, TrancheReport } from "@/lib/pricing/report";
import { roomAddress } from "../_frame/rooms";
import { Hull } from "../_structure/hull/Hull";
import { waterLine } from "../_structure/hull/law";
import { Pointable } from "../_talk/Pointing";
import { ReportClasses } from "./ReportClasses";

const TimelineChart = dynamic(() => import("./TimelineChart").then((module) => module.TimelineChart), {
  ssr: false,
});

const LEVELS = [0.95, 0.99, 0.999];

type Run = Operations["runs.open"]["output"];

/** A run as it was priced: pool, classes, loss law, expected loss over time, contracts, warnings. */
export function RunView({
  workspaceId,
  deal,
  run,
  classNames,
}: {
  workspaceId: string;
  deal: { id: string; name: string };
  run: Run;
  classNames: Readonly<Record<string, string>>;
}) {
  const { report, request } = run;
  const nameOf = (id: string) => classNames[id] ?? id;
  const pool: [string, number | null, FigureUnit, string, string][] = [
    ["Expected loss", report.pool.expectedLoss, "percent", "% of notional", "expectedLoss"],
    ["Defaults expected", report.pool.defaultsExpected, "plain", "names", "defaultsExpected"],
    ["Par spread", report.pool.parSpread, "basisPoints", "bp", "parSpread"],
    ["Annuity", report.pool.annuity, "years", "years", "annuity"],
    ["Realised loss", report.pool.realisedLoss, "percent", "% of notional", "realisedLoss"],
    ["Loss unit", report.pool.unit, "percent", "% of notional", "unit"],
  ];
  return (
    <Stack gap="lg">
      <Group justify="space-between">
        <div>
          <Link href={roomAddress(workspaceId, deal.id, "runs")}>All runs</Link>
          <Title order={2}>Run {run.number}</Title>
          <Text c="dimmed" size="sm">
            Version {run.dealVersion} of the deal
            {run.isCurrent ? "" : "; the deal, its pool or its market has changed since"};{" "}
            {run.at.slice(0, 16).replace("T", " ")} UTC; {run.engine}; request{" "}
            <code title={run.requestHash}>{run.requestHash.slice(0, 12)}</code>
            {run.note && `; ${run.note}`}
          </Text>
        </div>
        <Group>
          <Button component={Link} href={`/w/${workspaceId}/sheet/${run.id}`} variant="default">
            Deal sheet to print
          </Button>
          <Button
            variant="default"
            onClick={() =>
              saveFile(`run-${run.number}-request.json`, JSON.stringify(request, null, 2), "application/json")
            }
          >
            Request as JSON
          </Button>
          <Button
            variant="default"
            onClick={() =>
              saveFile(`run-${run.number}-report.json`, JSON.stringify(report, null, 2), "application/json")
            }
          >
            Report as JSON
          </Button>
        </Group>
      </Group>
      <SimpleGrid cols={{ base: 2, sm: 3, md: 6 }}>
        {pool.map(([label, value, unit, words, key]) => (
          <div key={label}>
            <Text size="xs" c="dimmed">
              {label} ({words})
            </Text>
            <Text fw={600}>
              <Pointable path={`pool.${key}`} label={`${label} of the pool`}>
                <Figure value={value} unit={unit} />
              </Pointable>
            </Text>
          </div>
        ))}
      </SimpleGrid>
      {report.tranches.length > 0 && (
        <Takeable name="structure and loss law">
          <Hull
            classes={report.tranches.map((tranche) => classText(tranche, nameOf(tranche.id)))}
            law={report.lossLaw}
            levels={LEVELS}
            reach={usualReach(report)}
            lawView="mass"
          />
        </Takeable>
      )}
      {report.tranches.length > 0 && (
        <ReportClasses report={report} nameOf={nameOf} currency={request.currency ?? "EUR"} />
      )}
      {report.timeline && report.tranches.length > 0 && (
        <Takeable name="expected loss over time">
          <TimelineChart
            timeline={report.timeline}
            names={report.tranches.map((tranche) => nameOf(tranche.id))}
          />
        </Takeable>
      )}
      {report.nthToDefault.length > 0 && (
        <Table.ScrollContainer minWidth={480}>
          <Table>
            <Table.Thead>
              <Table.Tr>
                <Table.Th>n-th to default</Table.Th>
                <Table.Th ta="right">Probability (%)</Table.Th>
                <Table.Th ta="right">Par spread (bp)</Table.Th>
                <Table.Th ta="right">Protection leg (%)</Table.Th>
                <Table.Th ta="right">Annuity (years)</Table.Th>
              </Table.Tr>
            </Table.Thead>
            <Table.Tbody>
              {report.nthToDefault.map((contract) => (
                <Table.Tr key={contract.n}>
                  <Table.Td>{contract.n}</Table.Td>
                  <Table.Td ta="right">
                    <Pointable
                      path={`nthToDefault/${contract.n}/probability`}
                      label={`Probability of default ${contract.n}`}
                    >
                      <Figure value={contract.probability} unit="percent" />
                    </Pointable>
                  </Table.Td>
                  <Table.Td ta="right">
                    <Pointable
                      path={`nthToDefault/${contract.n}/parSpread`}
                      label={`Par spread of default ${contract.n}`}
                    >
                      <Figure value={contract.parSpread} unit="basisPoints" />
                    </Pointable>
                  </Table.Td>
                  <Table.Td ta="right">
                    <Pointable
                      path={`nthToDefault/${contract.n}/protectionLeg`}
                      label={`Protection leg of default ${contract.n}`}
                    >
                      <Figure value={contract.protectionLeg} unit="percent" />
                    </Pointable>
                  </Table.Td>
                  <Table.Td ta="right">
                    <Pointable
                      path={`nthToDefault/${contract.n}/annuity`}
                      label={`Annuity of default ${contract.n}`}
                    >
                      <Figure value={contract.annuity} unit="years" />
                    </Pointable>
                  </Table.Td>
                </Table.Tr>
              ))}
            </Table.Tbody>
          </Table>
        </Table.ScrollContainer>
      )}
      {report.warnings.length > 0 && (
        <Alert color="yellow" title="Warnings">
          {report.warnings.map((warning) => (
            <Text size="sm" key={`${warning.code} ${warning.subject}`}>
              {warning.message}
            </Text>
          ))}
        </Alert>
      )}
      <Text size="sm" c="dimmed">
        Bound on the numerical error of the expected loss below a strike:{" "}
        <Figure value={report.numericalError} /> of the pool's notional.
      </Text>
    </Stack>
  );
}

/** A priced class as the hull takes it: strikes in percent. */
function classText({ id, attachment, detachment }: TrancheReport, name: string): ClassText {
  const percent = (strike: number) => textOf(strike, 100);
  return {
    key: id,
    id,
    name,
    attachment: percent(attachment),
    detachment: percent(detachment),
    running: "",
    upfront: "",
  };
}

function usualReach({ tranches, lossLaw }: PricingReport): number {
  const strikes = tranches.flatMap(({ attachment, detachment }) => [
    attachment,
    detachment < 1 ? detachment : 0,
  ]);
  const lines = lossLaw ? LEVELS.map((level) => waterLine(lossLaw, level)) : [];
  return Math.min(1, 1.12 * Math.max(0.02, ...strikes, ...lines));
}
