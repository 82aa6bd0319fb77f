"use client";

import { Alert, Grid, Text, Textarea, TextInput } from "@mantine/core";
import { Problems } from "@/app/_ui/Problems";
import { usePriced } from "@/app/_ui/usePriced";
import { useQuickFigures } from "@/app/_ui/useQuickFigures";
import { dealPath } from "@/lib/deals/check";
import type { QuickFigures } from "@/lib/pricing/quickFigures";
import type { TrancheReport } from "@/lib/pricing/report";
import { useDeal } from "../_frame/dealContext";
import { ClassTable } from "./ClassTable";
import { HullRoom } from "./HullRoom";
import { Income } from "./Income";
import { Terms } from "./Terms";

/** The room of the capital structure: terms, hull and law, classes with figures that follow what is typed. */
export function Structure() {
  const { form, change, mayEdit, problems, refused, problemAt, request, parts, isDirty } = useDeal();
  const priced = usePriced(request);
  const quick = useQuickFigures(request);
  const { report } = priced;
  const isBehind = quick !== null && priced.of !== request;
  const tranches = isBehind ? withQuick(quick, report?.tranches ?? []) : (report?.tranches ?? []);
  const engineProblems = priced.problems.map((problem) => ({ ...problem, path: dealPath(problem.path) }));
  return (
    <>
      <Terms />
      <Grid gap="md">
        <Grid.Col span={{ base: 12, lg: 9 }}>
          <HullRoom law={report?.lossLaw} />
        </Grid.Col>
        <Grid.Col span={{ base: 12, lg: 3 }}>
          {report && priced.of && <Income report={report} request={priced.of} />}
          <Text size="sm" c="dimmed" mt="xs" role="status">
            {statusWords(priced.isBusy, priced.milliseconds, isDirty, request !== null)}
          </Text>
          {report && report.warnings.length > 0 && (
            <Alert color="yellow" title="Warnings" mt="xs">
              {report.warnings.map((warning) => (
                <Text size="sm" key={`${warning.code} ${warning.subject}`}>
                  {warning.message}
                </Text>
              ))}
            </Alert>
          )}
        </Grid.Col>
      </Grid>
      <ClassTable tranches={tranches} currency={parts?.currency ?? "EUR"} />
      {refused.length === 0 && <Problems title="Before it can be saved" problems={problems} />}
      <Problems title="Why there are no new figures" problems={problems.length > 0 ? [] : engineProblems} />
      <TextInput
        size="xs"
        label="n-th-to-default contracts"
        placeholder="1, 2, 3"
        disabled={!mayEdit}
        value={form.nthToDefault}
        error={problemAt("content.nthToDefault")}
        onChange={(event) => change({ nthToDefault: event.currentTarget.value }, "nthToDefault")}
      />
      <Textarea
        size="xs"
        label="Notes"
        autosize
        minRows={2}
        disabled={!mayEdit}
        value={form.notes}
        error={problemAt("content.notes")}
        onChange={(event) => change({ notes: event.currentTarget.value }, "notes")}
      />
    </>
  );
}

/** Figures that follow a drag where there are any; what needs a whole law waits for the full price. */
function withQuick(
  quick: readonly (QuickFigures | null)[],
  priced: readonly TrancheReport[],
): readonly TrancheReport[] {
  const followed = quick.flatMap((figures) =>
    figures ? [{ ...figures, standardDeviation: null, quantiles: [] }] : [],
  );
  const known = new Set(followed.map(({ id }) => id));
  return [...followed, ...priced.filter(({ id }) => !known.has(id))];
}

function statusWords(
  isBusy: boolean,
  milliseconds: number | null,
  isDirty: boolean,
  isReady: boolean,
): string {
  if (!isReady) return "Figures follow once the deal reads without a problem.";
  if (isBusy) return "Pricing what is on screen…";
  if (milliseconds === null) return "";
  const what = isDirty ? "what is typed, not saved" : "the saved deal";
  return `Figures of ${what}, priced in this browser in ${milliseconds} ms. A run keeps them.`;
}
