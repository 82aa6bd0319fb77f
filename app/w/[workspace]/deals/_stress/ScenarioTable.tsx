"use client";

import { Alert, Group, SegmentedControl, Text, Title } from "@mantine/core";
import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useAddress } from "@/app/_ui/useAddress";
import { usePieces } from "@/app/_ui/usePieces";
import type { PricingRequest } from "@/lib/pricing/request";
import { noShock, type Shock } from "@/lib/pricing/shock";
import type { ShockedFigures } from "@/lib/pricing/shockedFigures";
import { shockWords } from "@/lib/scenarios/form";
import type { NamedClass } from "../_drivers/NameTable";
import { PiecesProgress } from "../_frame/PiecesProgress";
import { figureIn, type Measure, measures, unitOf } from "./measures";
import type { Scenarios } from "./text";

interface Row {
  readonly key: string;
  readonly name: string;
  readonly words: string;
  readonly figures: ShockedFigures | undefined;
}

/** What is typed and every kept scenario side by side, class by class. */
export function ScenarioTable({
  request,
  classes,
  scenarios,
  typed,
}: {
  request: PricingRequest;
  classes: readonly NamedClass[];
  scenarios: Scenarios["scenarios"];
  typed: Shock | null;
}) {
  const [measureText, setMeasure] = useAddress("of", "value");
  const [from, setFrom] = useAddress("scenarios", "difference");
  const measure = measureText as Measure;
  const isDifference = from === "difference";
  const currency = request.currency ?? "EUR";
  const asked = useMemo(() => {
    const bare = { ...request, nthToDefault: [], include: [] };
    const shocks = [noShock, ...(typed ? [typed] : []), ...scenarios.map(({ content }) => content.shock)];
    const pieces = shocks.map((shock) => ({ request: bare, shock }));
    return { pieces, key: `scenarios ${JSON.stringify([bare, shocks])}` };
  }, [request, typed, scenarios]);
  const pieces = usePieces("shocked", asked.key, asked.pieces);
  const [base, ...others] = pieces.outputs;
  const rows: Row[] = [
    { key: "base", name: "As it is", words: "nothing moves", figures: base },
    ...(typed ? [{ key: "typed", name: "Typed above", words: shockWords(typed), figures: others[0] }] : []),
    ...scenarios.map(({ id, name, content }, i) => ({
      key: id,
      name,
      words: shockWords(content.shock),
      figures: others[i + (typed ? 1 : 0)],
    })),
  ];
  const columns = useMemo<FigureColumn<Row>[]>(
    () => [
      { key: "name", header: "Scenario", unit: "text", value: ({ name }) => name },
      { key: "words", header: "Shock", unit: "text", value: ({ words }) => words },
      ...classes.map(
        ({ id, name }): FigureColumn<Row> => ({
          key: `class ${id}`,
          header: name,
          unit: unitOf(measure),
          unitWords: `${isDifference ? "change, " : ""}${measures(currency).find((row) => row.value === measure)?.words}`,
          value: (row) =>
            figureIn(row.figures, id, measure, isDifference && row.key !== "base" ? base : undefined),
        }),
      ),
    ],
    [classes, measure, isDifference, currency, base],
  );
  const troubles = rows.flatMap(({ name, figures }) =>
    figures && !figures.ok ? figures.problems.slice(0, 3).map(({ message }) => `${name}: ${message}`) : [],
  );
  return (
    <section aria-labelledby="scenarios">
      <Group justify="space-between" align="end">
        <Title order={2} size="h5" id="scenarios">
          Scenarios
        </Title>
        <Group gap="xs" className="screenOnly">
          <SegmentedControl
            size="xs"
            aria-label="Figure"
            value={measure}
            onChange={setMeasure}
            data={measures(currency).map(({ value, label }) => ({ value, label }))}
          />
          <SegmentedControl
            size="xs"
            aria-label="Whole figures or changes"
            value={isDifference ? "difference" : "whole"}
            onChange={setFrom}
            data={[
              { value: "difference", label: "Change" },
              { value: "whole", label: "Whole" },
            ]}
          />
        </Group>
      </Group>
      <Text size="sm" c="dimmed">
        Every shock on what is typed now; values are to the protection seller, with what defaults make it pay
        taken off. {isDifference && "The first row is whole, the others are changes from it."}
      </Text>
      <PiecesProgress pieces={pieces} total={asked.pieces.length} what="scenarios" />
      <FigureTable
        name="scenarios"
        columns={columns}
        rows={rows}
        keyOf={({ key }) => key}
        minWidth={420 + 110 * classes.length}
      />
      {troubles.length > 0 && (
        <Alert color="yellow" title="Scenarios that cannot be priced on this pool">
          {troubles.map((message) => (
            <Text size="sm" key={message}>
              {message}
            </Text>
          ))}
        </Alert>
      )}
    </section>
  );
}
