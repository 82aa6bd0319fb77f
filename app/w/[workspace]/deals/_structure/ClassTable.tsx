"use client";

import { Button, Group, NativeSelect, Text, TextInput } from "@mantine/core";
import { useMemo } from "react";
import { FigureTable } from "@/app/_ui/table/FigureTable";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import { useKept } from "@/app/_ui/useKept";
import { withClass } from "@/lib/deals/classEdits";
import type { ClassText } from "@/lib/deals/form";
import { scaled, typedNumber } from "@/lib/platform/typed";
import type { TrancheReport } from "@/lib/pricing/report";
import { useDeal } from "../_frame/dealContext";
import { hiddenTrancheColumns, type LossesIn, lossesIn, trancheColumns } from "../_report/trancheColumns";
import { PinMark } from "../_talk/Pins";
import { ClassActions, newKey } from "./ClassActions";

/** A class as typed, with the figures there are of it. */
interface ClassRow {
  readonly typed: ClassText;
  readonly place: number;
  readonly figures: TrancheReport | null;
}

type TypedField = "name" | "attachment" | "detachment" | "running" | "upfront";

const typedColumns: readonly (FigureColumn<ClassRow> & { key: TypedField })[] = [
  { key: "name", header: "Class", unit: "text", value: ({ typed }) => typed.name },
  typedColumn("attachment", "Attachment", "percent", "%", 100),
  typedColumn("detachment", "Detachment", "percent", "%", 100),
  typedColumn("running", "Coupon", "basisPoints", "bp", 10_000),
  typedColumn("upfront", "Upfront", "percent", "%", 100),
];

function typedColumn<Field extends TypedField>(
  key: Field,
  header: string,
  unit: "percent" | "basisPoints",
  unitWords: string,
  by: number,
) {
  const value = ({ typed }: ClassRow) => {
    const read = typedNumber(typed[key]);
    return typeof read === "number" ? scaled(read, by) : typed[key] || null;
  };
  return { key, header, unit, unitWords, value };
}

/** The classes: what is typed of each, and its figures as they follow. */
export function ClassTable({ tranches, currency }: { tranches: readonly TrancheReport[]; currency: string }) {
  const { form, change, mayEdit, problemAt } = useDeal();
  const [kept, setMeasure] = useKept<LossesIn>("losses in");
  const measure = kept ?? "class";
  const columns = useMemo(() => {
    const figures = trancheColumns(currency, measure).map((column) => ({
      ...column,
      value: ({ figures: row }: ClassRow) => (row ? column.value(row) : null),
    }));
    return [...typedColumns, ...figures] as FigureColumn<ClassRow>[];
  }, [currency, measure]);
  const rows = form.classes.map((typed, place) => ({
    typed,
    place,
    figures: tranches.find(({ id }) => id === typed.id) ?? null,
  }));
  const set = (place: number, field: TypedField, text: string) =>
    change(
      { classes: form.classes.map((row, i) => (i === place ? { ...row, [field]: text } : row)) },
      `class ${place} ${field}`,
    );
  const field = (key: TypedField, header: string, { typed, place }: ClassRow) => {
    const problem =
      problemAt(`content.classes.${place}.${key}`) ??
      (key === "name" ? problemAt(`content.classes.${place}`) : undefined);
    return (
      <TextInput
        size="xs"
        w={key === "name" ? 130 : 78}
        aria-label={`${header} of class ${place + 1}`}
        classNames={{ input: key === "name" ? "" : "figure numberInput" }}
        disabled={!mayEdit}
        value={typed[key]}
        title={problem}
        error={problem !== undefined}
        onChange={(event) => set(place, key, event.currentTarget.value)}
      />
    );
  };
  return (
    <div>
      {rows.length === 0 && (
        <Text c="dimmed">
          No class yet: without one only the pool and its n-th-to-default contracts are priced.
        </Text>
      )}
      {rows.length > 0 && (
        <FigureTable
          name="classes"
          columns={columns}
          rows={rows}
          keyOf={({ typed }) => typed.key}
          hiddenAtFirst={hiddenTrancheColumns}
          minWidth={1100}
          cellOf={(column, row) => {
            const typed = typedColumns.find(({ key }) => key === column.key);
            if (column.key === "name")
              return (
                <Group gap={0} wrap="nowrap">
                  {typed && mayEdit ? field(typed.key, typed.header, row) : row.typed.name}
                  <ClassMark row={row.typed} />
                </Group>
              );
            return typed && mayEdit ? field(typed.key, typed.header, row) : undefined;
          }}
          actions={
            mayEdit
              ? (row) => (
                  <ClassActions
                    row={row.typed}
                    classes={form.classes}
                    onChange={(classes) => change({ classes })}
                  />
                )
              : undefined
          }
          tools={
            <NativeSelect
              size="xs"
              aria-label="What losses are measured in"
              data={[...lossesIn]}
              value={measure}
              onChange={(event) => setMeasure(event.currentTarget.value as LossesIn)}
            />
          }
        />
      )}
      {mayEdit && (
        <Button
          mt="xs"
          size="compact-sm"
          variant="default"
          onClick={() => change({ classes: withClass(form.classes, newKey()) })}
        >
          Add a class
        </Button>
      )}
    </div>
  );
}

/** A class can be talked about once it is saved: only then has it an id that stays. */
function ClassMark({ row }: { row: ClassText }) {
  const { deal } = useDeal();
  const saved = deal?.content.classes.find(({ id }) => id === row.id);
  return saved ? <PinMark pin={{ kind: "class", id: saved.id, label: saved.name ?? saved.id }} /> : null;
}
