"use client";

import { NativeSelect, NumberInput, Table, Text, Title } from "@mantine/core";
import { allDigits } from "@/app/_ui/figures";
import {
  type ColumnField,
  type ColumnReading,
  columnFields,
  fieldsWithYears,
  textFields,
  yearsOf,
} from "@/lib/pools/import/columns";
import {
  type ColumnUnit,
  columnUnits,
  type DecimalMark,
  inUnit,
  isBlank,
  readNumber,
} from "@/lib/pools/import/numbers";
import type { ImportTable } from "@/lib/pools/import/table";

const fieldWords: Record<ColumnField, string> = {
  ignore: "left out",
  id: "id",
  name: "name",
  sector: "sector",
  notional: "notional",
  recovery: "recovery",
  lossGivenDefault: "loss given default",
  loading: "factor loading",
  spread: "par spread",
  yearly: "yearly default probability",
  cumulative: "cumulative default probability",
  hazard: "hazard rate",
  upfront: "upfront",
  coupon: "running coupon of the upfront",
  status: "status (defaulted)",
};

const unitWords: Record<ColumnUnit, string> = {
  plain: "as written",
  percent: "%",
  basisPoints: "bp",
  thousands: "thousands",
  millions: "millions",
};

/** How each column is read, with an example, and changeable. */
export function ColumnChoices({
  table,
  columns,
  onChange,
}: {
  table: ImportTable;
  columns: readonly ColumnReading[];
  onChange: (columns: readonly ColumnReading[]) => void;
}) {
  const change = (i: number, part: Partial<ColumnReading>) =>
    onChange(columns.map((column, k) => (k === i ? { ...column, remark: null, ...part } : column)));
  return (
    <section aria-label="Columns">
      <Title order={2} size="h4">
        How the columns are read
      </Title>
      <Table.ScrollContainer minWidth={760}>
        <Table verticalSpacing={4}>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Header in the file</Table.Th>
              <Table.Th>Read as</Table.Th>
              <Table.Th>Tenor (years)</Table.Th>
              <Table.Th>Unit</Table.Th>
              <Table.Th>Decimal mark</Table.Th>
              <Table.Th>First cell, as read</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {columns.map((column, i) => (
              <ColumnChoice
                // biome-ignore lint/suspicious/noArrayIndexKey: a column is its position in the file
                key={i}
                column={column}
                example={table.rows.find(({ cells }) => !isBlank(cells[i] ?? ""))?.cells[i] ?? ""}
                onChange={(part) => change(i, part)}
              />
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
    </section>
  );
}

function ColumnChoice({
  column,
  example,
  onChange,
}: {
  column: ColumnReading;
  example: string;
  onChange: (part: Partial<ColumnReading>) => void;
}) {
  const { header, field, unit, years, mark, remark } = column;
  const isNumber = !textFields.includes(field);
  const label = header || "unnamed column";
  return (
    <Table.Tr>
      <Table.Td>
        {label}
        {remark && (
          <Text size="xs" c="var(--remark-color)">
            {remark}
          </Text>
        )}
      </Table.Td>
      <Table.Td>
        <NativeSelect
          aria-label={`${label} read as`}
          value={field}
          data={columnFields.map((value) => ({ value, label: fieldWords[value] }))}
          onChange={(event) => {
            const next = event.currentTarget.value as ColumnField;
            onChange({ field: next, years: yearsOf(next, years) });
          }}
        />
      </Table.Td>
      <Table.Td>
        {fieldsWithYears.includes(field) && (
          <NumberInput
            aria-label={`${label} tenor in years`}
            w={90}
            min={0}
            max={100}
            value={years ?? ""}
            onChange={(value) => onChange({ years: typeof value === "number" ? value : null })}
          />
        )}
      </Table.Td>
      <Table.Td>
        {isNumber && (
          <NativeSelect
            aria-label={`${label} unit`}
            value={unit}
            data={columnUnits.map((value) => ({ value, label: unitWords[value] }))}
            onChange={(event) => onChange({ unit: event.currentTarget.value as ColumnUnit })}
          />
        )}
      </Table.Td>
      <Table.Td>
        {isNumber && (
          <NativeSelect
            aria-label={`${label} decimal mark`}
            value={mark}
            data={[
              { value: ".", label: "point" },
              { value: ",", label: "comma" },
            ]}
            onChange={(event) => onChange({ mark: event.currentTarget.value as DecimalMark })}
          />
        )}
      </Table.Td>
      <Table.Td>
        {example}
        {isNumber && example !== "" && <Text span c="dimmed">{` → ${exampleRead(column, example)}`}</Text>}
      </Table.Td>
    </Table.Tr>
  );
}

function exampleRead({ field, unit, mark }: ColumnReading, cell: string): string {
  const found = readNumber(cell, mark);
  if (!found) return "no number";
  const value = inUnit(found.value, found.unit ?? unit);
  if (field === "spread" || field === "coupon") return `${allDigits(value, "basisPoints")} bp`;
  return field === "notional" || field === "loading" ? allDigits(value) : `${allDigits(value, "percent")} %`;
}
