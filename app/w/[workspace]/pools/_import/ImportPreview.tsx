"use client";

import { Alert, List, Table, Text, TextInput, Title } from "@mantine/core";
import { useState } from "react";
import type { ImportProblem } from "@/lib/pools/import/cells";
import type { ImportReading } from "@/lib/pools/import/read";
import type { ImportedRow } from "@/lib/pools/import/row";

const MOST_SHOWN = 100;
const FIRST_ROWS = 8;

/** What a table came to: counts, lines set aside, every problem with its cell to be mended in place, the first rows. */
export function ImportPreview({
  reading,
  titleLines,
  onCell,
}: {
  reading: ImportReading;
  titleLines: number;
  onCell: (line: number, column: number, text: string) => void;
}) {
  const { rows, names, problems, tableProblems, setAside } = reading;
  return (
    <section aria-label="Preview">
      <Title order={2} size="h4">
        What was read
      </Title>
      <Text aria-live="polite">
        {rows.length} rows: {names.length} fit, {rows.length - names.length} do not.
        {titleLines > 0 && ` ${titleLines} ${titleLines === 1 ? "line" : "lines"} above the header left out.`}
      </Text>
      {setAside.map(({ line, cells, remark }) => (
        <Text key={line} size="sm" c={remark ? "var(--remark-color)" : "inherit"}>
          Line {line} set aside as no name: {cells.filter((cell) => cell !== "").join(" · ")}
          {remark && `. ${remark}`}
        </Text>
      ))}
      {tableProblems.length > 0 && (
        <Alert color="red" role="alert" title="The table cannot be taken yet">
          <List size="sm">
            {tableProblems.map((problem) => (
              <List.Item key={problem}>{problem}</List.Item>
            ))}
          </List>
        </Alert>
      )}
      {tableProblems.length === 0 && problems.length > 0 && (
        <ProblemTable problems={problems} onCell={onCell} />
      )}
      <FirstRows reading={reading} />
    </section>
  );
}

function ProblemTable({
  problems,
  onCell,
}: {
  problems: readonly ImportProblem[];
  onCell: (line: number, column: number, text: string) => void;
}) {
  return (
    <>
      <Table.ScrollContainer minWidth={620}>
        <Table verticalSpacing={4} aria-label="Problems">
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Line</Table.Th>
              <Table.Th>Column</Table.Th>
              <Table.Th>Cell</Table.Th>
              <Table.Th>What does not fit</Table.Th>
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {problems.slice(0, MOST_SHOWN).map((problem) => (
              <ProblemRow
                key={`${problem.line} ${problem.position} ${problem.reason}`}
                problem={problem}
                onCell={onCell}
              />
            ))}
          </Table.Tbody>
        </Table>
      </Table.ScrollContainer>
      {problems.length > MOST_SHOWN && (
        <Text size="sm">
          … and {problems.length - MOST_SHOWN} more; the CSV of rejected rows has them all.
        </Text>
      )}
    </>
  );
}

function ProblemRow({
  problem: { line, position, column, value, reason },
  onCell,
}: {
  problem: ImportProblem;
  onCell: (line: number, column: number, text: string) => void;
}) {
  const [text, setText] = useState(value);
  const settle = () => text !== value && onCell(line, position, text);
  return (
    <Table.Tr>
      <Table.Td>{line}</Table.Td>
      <Table.Td>{column}</Table.Td>
      <Table.Td>
        <TextInput
          size="xs"
          aria-label={`Line ${line}, ${column}`}
          value={text}
          onChange={(event) => setText(event.currentTarget.value)}
          onBlur={settle}
          onKeyDown={(event) => event.key === "Enter" && settle()}
        />
      </Table.Td>
      <Table.Td>{reason}</Table.Td>
    </Table.Tr>
  );
}

function FirstRows({ reading: { columns, rows } }: { reading: ImportReading }) {
  return (
    <Table.ScrollContainer minWidth={620}>
      <Table verticalSpacing={2} fz="sm" aria-label="First rows">
        <Table.Thead>
          <Table.Tr>
            <Table.Th>Line</Table.Th>
            {columns.map(({ header, field }, i) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: a column is its position in the file
              <Table.Th key={i} c={field === "ignore" ? "dimmed" : "inherit"}>
                {header}
              </Table.Th>
            ))}
          </Table.Tr>
        </Table.Thead>
        <Table.Tbody>
          {rows.slice(0, FIRST_ROWS).map((row) => (
            <FirstRow key={row.line} row={row} width={columns.length} />
          ))}
        </Table.Tbody>
      </Table>
    </Table.ScrollContainer>
  );
}

function FirstRow({ row, width }: { row: ImportedRow; width: number }) {
  const reasons = new Map(row.problems.map(({ position, reason }) => [position, reason]));
  return (
    <Table.Tr>
      <Table.Td>{row.line}</Table.Td>
      {Array.from({ length: width }, (_, i) => (
        <Table.Td
          // biome-ignore lint/suspicious/noArrayIndexKey: a cell is its position in the row
          key={i}
          title={reasons.get(i) ?? ""}
          c={reasons.has(i) ? "var(--mantine-color-error)" : "inherit"}
        >
          {reasons.has(i) ? `⚠ ${row.cells[i] ?? ""}` : row.cells[i]}
        </Table.Td>
      ))}
    </Table.Tr>
  );
}
