"use client";

import { Alert, Group, NativeSelect, SegmentedControl, Text } from "@mantine/core";
import { useMemo } from "react";
import { Figure } from "@/app/_ui/Figure";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useAddress } from "@/app/_ui/useAddress";
import { cellAt, type StressCell, type StressGrid } from "@/lib/pricing/stressGrid";
import type { NamedClass } from "../_drivers/NameTable";
import { figureIn, type Measure, measures, unitOf } from "./measures";
import styles from "./stress.module.css";

interface Row {
  readonly index: number;
  readonly step: number;
}

/** A grid's cells as numbers on shades; the shade follows the distance from the figure without a shock. */
export function GridView({
  grid,
  cells,
  classes,
  currency,
}: {
  grid: StressGrid;
  cells: readonly (StressCell | undefined)[];
  classes: readonly NamedClass[];
  currency: string;
}) {
  const [chosen, setClass] = useAddress("class", "");
  const [measureText, setMeasure] = useAddress("show", "value");
  const [from, setFrom] = useAddress("from", "whole");
  const measure = measureText as Measure;
  const isDifference = from === "difference";
  const id = classes.some((row) => row.id === chosen) ? chosen : (classes[0]?.id ?? "");
  const [base] = cells;
  const rows = grid.spreads.steps.map((step, index) => ({ index, step }));
  const isRelative = grid.spreads.kind === "relative";
  const columns = useMemo<FigureColumn<Row>[]>(
    () => [
      {
        key: "spreads",
        header: "Spreads",
        unit: isRelative ? "percent" : "basisPoints",
        unitWords: isRelative ? "wider by, %" : "wider by, bp",
        value: ({ step }) => step,
      },
      ...grid.correlations.map(
        (shift, column): FigureColumn<Row> => ({
          key: `shift ${column}`,
          header: `Correlation ${signed(shift)}`,
          unit: unitOf(measure),
          unitWords: `${isDifference ? "change, " : ""}${measures(currency).find((row) => row.value === measure)?.words}`,
          value: ({ index }) =>
            figureIn(cells[cellAt(grid, index, column)], id, measure, isDifference ? base : undefined),
        }),
      ),
    ],
    [grid, cells, base, id, measure, isDifference, isRelative, currency],
  );
  const moved = (row: Row, column: number) =>
    figureIn(cells[cellAt(grid, row.index, column)], id, measure, base);
  const most = Math.max(
    0,
    ...rows.flatMap((row) => grid.correlations.map((_, column) => Math.abs(moved(row, column) ?? 0))),
  );
  const troubles = [
    ...new Set(
      cells.flatMap((cell) => (cell && !cell.ok ? cell.problems.slice(0, 2).map((one) => one.message) : [])),
    ),
  ];
  const isHeld = cells.some((cell) => cell?.ok && cell.isHeld);
  return (
    <div>
      <FigureTable
        name="stress grid"
        columns={columns}
        rows={rows}
        keyOf={({ index }) => String(index)}
        minWidth={180 + 110 * grid.correlations.length}
        tools={
          <Group gap="xs" className="screenOnly">
            <NativeSelect
              size="xs"
              aria-label="Class"
              data={classes.map((row) => ({ value: row.id, label: row.name }))}
              value={id}
              onChange={(event) => setClass(event.currentTarget.value)}
            />
            <SegmentedControl
              size="xs"
              aria-label="Figure in the grid"
              value={measure}
              onChange={setMeasure}
              data={measures(currency).map(({ value, label }) => ({ value, label }))}
            />
            <SegmentedControl
              size="xs"
              aria-label="Whole figures or changes in the grid"
              value={isDifference ? "difference" : "whole"}
              onChange={setFrom}
              data={[
                { value: "whole", label: "Whole" },
                { value: "difference", label: "Change" },
              ]}
            />
          </Group>
        }
        cellOf={(column, row) => {
          const place = columns.indexOf(column) - 1;
          if (place < 0) return <strong>{signed(row.step, isRelative ? 100 : 10_000)}</strong>;
          const cell = cells[cellAt(grid, row.index, place)];
          if (cell === undefined) return <span title="Not worked out yet.">·</span>;
          const change = moved(row, place);
          return (
            <Cell
              value={column.value(row) as number | null}
              unit={unitOf(measure)}
              share={change === null || most === 0 ? 0 : change / most}
              isWorse={change !== null && (measure === "value" ? change < 0 : change > 0)}
              isHeld={cell.ok && cell.isHeld}
              otherwise={otherwiseOf(cell)}
            />
          );
        }}
      />
      <Text size="xs" c="dimmed" mt={4}>
        The stronger the shade, the further from the figure without a shock; plain shades are worse for the
        protection seller, hatched ones better.
        {isHeld && " † A correlation met the end of its range and was held there."}
      </Text>
      {troubles.length > 0 && (
        <Alert color="yellow" title="Cells that cannot be priced" mt="xs">
          {troubles.slice(0, 6).map((message) => (
            <Text size="sm" key={message}>
              {message}
            </Text>
          ))}
        </Alert>
      )}
    </div>
  );
}

function Cell({
  value,
  unit,
  share,
  isWorse,
  isHeld,
  otherwise,
}: {
  value: number | null;
  unit: ReturnType<typeof unitOf>;
  /** The change as a share of the grid's largest, −1 to 1. */
  share: number;
  isWorse: boolean;
  isHeld: boolean;
  otherwise: string;
}) {
  const strength = `${Math.round(100 * Math.abs(share))}%`;
  return (
    <span
      className={isWorse ? styles.worse : styles.better}
      style={{ "--strength": strength } as React.CSSProperties}
    >
      <Figure value={value} unit={unit} otherwise={otherwise} />
      {isHeld && (
        <span title="A correlation was held at the end of its range." aria-hidden>
          {" "}
          †
        </span>
      )}
    </span>
  );
}

function otherwiseOf(cell: StressCell): string {
  if (!cell.ok) return cell.problems[0]?.message ?? "This cell cannot be priced.";
  return "The class has no such figure here.";
}

function signed(value: number, by = 100): string {
  const size = Number((Math.abs(value) * by).toPrecision(12));
  return value === 0 ? "±0" : `${value > 0 ? "+" : "−"}${size}`;
}
