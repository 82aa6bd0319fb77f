"use client";

import { Button, Checkbox, Group, Menu } from "@mantine/core";
import { type FigureColumn, headerOf } from "./figureColumns";
import { saveCsv, saveWorkbook, type Takeable, tabSeparated } from "./takeAway";

/** What can be done with a table as a whole: choose its columns, copy it, save it as CSV or as a workbook. */
export function TableTools<Row>({
  name,
  table,
  choosable,
  hidden,
  onHidden,
}: {
  name: string;
  table: Takeable<Row>;
  choosable: readonly FigureColumn<Row>[];
  hidden: readonly string[];
  onHidden(hidden: readonly string[]): void;
}) {
  return (
    <Group gap="xs" className="screenOnly">
      <Menu closeOnItemClick={false} position="bottom-start">
        <Menu.Target>
          <Button size="compact-xs" variant="default">
            Columns
          </Button>
        </Menu.Target>
        <Menu.Dropdown mah="60vh" style={{ overflowY: "auto" }}>
          {choosable.map((column) => {
            const isShown = !hidden.includes(column.key);
            const toggle = () =>
              onHidden(isShown ? [...hidden, column.key] : hidden.filter((key) => key !== column.key));
            return (
              <Menu.Item key={column.key} component="div" onClick={toggle}>
                <Checkbox
                  size="xs"
                  label={headerOf(column)}
                  checked={isShown}
                  onChange={toggle}
                  tabIndex={-1}
                />
              </Menu.Item>
            );
          })}
        </Menu.Dropdown>
      </Menu>
      <Menu position="bottom-start">
        <Menu.Target>
          <Button size="compact-xs" variant="default">
            Take away
          </Button>
        </Menu.Target>
        <Menu.Dropdown>
          <Menu.Item onClick={() => navigator.clipboard.writeText(tabSeparated(table))}>
            Copy for a spreadsheet
          </Menu.Item>
          <Menu.Item onClick={() => saveCsv(name, table)}>Save as CSV</Menu.Item>
          <Menu.Item onClick={() => saveWorkbook(name, table)}>Save as XLSX</Menu.Item>
        </Menu.Dropdown>
      </Menu>
    </Group>
  );
}
