"use client";

import { Loader, Text, Title } from "@mantine/core";
import { useEffect, useMemo, useState } from "react";
import { Problems } from "@/app/_ui/Problems";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { EngineLine } from "@/lib/compute/browserEngine";
import type { AttributionAnswer, Mover } from "@/lib/pricing/attribution";
import type { OpenRun } from "./openRun";

interface Line {
  readonly key: string;
  readonly label: string;
  readonly values: Readonly<Record<string, number | null>>;
}

const words: Record<Mover, string> = {
  names: "Names, notionals, recoveries",
  spreads: "Spreads",
  discount: "Discount curve",
  correlation: "Correlation and loss law",
  structure: "Structure",
  time: "Time and schedule",
};

/** What moved each class's value between two runs, part by part, summing to the whole change. */
export function Movers({
  earlier,
  later,
  nameOf,
}: {
  earlier: OpenRun;
  later: OpenRun;
  nameOf(id: string): string;
}) {
  const [answer, setAnswer] = useState<AttributionAnswer | null>(null);
  useEffect(() => {
    const line = new EngineLine();
    line.run("attribute", { before: earlier.request, after: later.request }).then(
      (found) => found && setAnswer(found),
      ({ message }: Error) => setAnswer({ ok: false, problems: [{ code: "engine", path: "", message }] }),
    );
    return () => line.close();
  }, [earlier.request, later.request]);
  const currency = later.request.currency ?? "EUR";
  const ids = useMemo(
    () => [...new Set([...earlier.report.tranches, ...later.report.tranches].map(({ id }) => id))],
    [earlier, later],
  );
  const columns = useMemo<FigureColumn<Line>[]>(
    () => [
      { key: "mover", header: "What moved the value", unit: "text", value: ({ label }) => label },
      ...ids.map((id) => ({
        key: id,
        header: nameOf(id),
        unit: "money" as const,
        unitWords: currency,
        value: ({ values }: Line) => values[id] ?? null,
      })),
    ],
    [ids, currency, nameOf],
  );
  if (answer === null) {
    return (
      <Text size="sm" c="dimmed" role="status">
        <Loader size="xs" /> Working out what moved the value, in this browser…
      </Text>
    );
  }
  if (!answer.ok) return <Problems title="What moved the value cannot be told" problems={answer.problems} />;
  const { before, after, steps } = answer.attribution;
  const lines: Line[] = [
    { key: "before", label: `Value to seller, run ${earlier.number}`, values: before },
    ...steps.map(({ movers, byClass }) => ({
      key: movers.join(" "),
      label: movers.map((mover) => words[mover]).join(" + "),
      values: byClass,
    })),
    { key: "after", label: `Value to seller, run ${later.number}`, values: after },
  ];
  return (
    <div>
      <Title order={3} size="h5">
        What moved the value
      </Title>
      <Text size="xs" c="dimmed">
        Parts of run {later.number} are taken over in the order names, spreads, discount, correlation,
        structure, time; each step is a full revaluation, and the steps sum to the whole change.
      </Text>
      <FigureTable name="movers" columns={columns} rows={lines} keyOf={({ key }) => key} />
    </div>
  );
}
