"use client";

import { ActionIcon, Button, Group } from "@mantine/core";
import { type ClipboardEvent, type KeyboardEvent, useRef } from "react";
import { QUOTE_CELLS, type QuoteProblem, quoteCells, withCells } from "@/lib/markets/quotesText";
import styles from "./quotesGrid.module.css";

const headers = ["Maturity", "Attachment (%)", "Detachment (%)", "Coupon (bp)", "Upfront (%)"];

/** Quotes in a grid, a line each: typed or pasted from a spreadsheet, what does not fit marked at its cell and told below. */
export function QuotesGrid({
  name,
  text,
  isEven,
  problems,
  isReadOnly,
  onChange,
}: {
  name: string;
  text: string;
  isEven: boolean;
  problems: readonly QuoteProblem[];
  isReadOnly: boolean;
  onChange(text: string): void;
}) {
  const table = useRef<HTMLTableElement>(null);
  const lines = text === "" ? [Array<string>(QUOTE_CELLS).fill("")] : quoteCells(text);
  const wrongAt = (line: number, cell: number) =>
    problems.find((problem) => problem.line === line && problem.cell === cell)?.message;
  const focus = (line: number, cell: number) =>
    table.current?.querySelector<HTMLInputElement>(`[data-place="${line}:${cell}"]`)?.focus();
  const key = (event: KeyboardEvent, line: number, cell: number) => {
    const step = { ArrowUp: -1, ArrowDown: 1, Enter: event.shiftKey ? -1 : 1 }[event.key];
    if (step === undefined) return;
    event.preventDefault();
    focus(line + step, cell);
  };
  const paste = (event: ClipboardEvent, line: number, cell: number) => {
    const pasted = event.clipboardData.getData("text/plain").replace(/\r?\n$/, "");
    if (isReadOnly || !/[\t\n;]/.test(pasted)) return;
    event.preventDefault();
    const rows = pasted.split(/\r?\n/).map((row) => row.split(/[\t;]/));
    onChange(withCells(text, { line, cell }, rows));
  };
  const keep = (next: readonly (readonly string[])[]) =>
    onChange(next.map((row) => row.join("\t")).join("\n"));
  return (
    <div>
      <div className={styles.scroller}>
        <table ref={table} className={styles.grid} aria-label={`Quotes of ${name || "the quoted pool"}`}>
          <thead>
            <tr>
              {headers.map((header, cell) => (
                <th key={header} scope="col">
                  {cell === 0 && isEven ? "Maturity (years)" : header}
                </th>
              ))}
              {!isReadOnly && <th aria-label="Remove" />}
            </tr>
          </thead>
          <tbody>
            {lines.map((cells, line) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: a quote is its place in the grid while it is typed
              <tr key={line}>
                {headers.map((header, cell) => {
                  const wrong = wrongAt(line, cell);
                  return (
                    <td key={header} data-wrong={wrong !== undefined || undefined} title={wrong}>
                      <input
                        aria-label={`${header} of quote ${line + 1}`}
                        aria-invalid={wrong !== undefined}
                        data-place={`${line}:${cell}`}
                        inputMode={cell === 0 && !isEven ? "text" : "decimal"}
                        readOnly={isReadOnly}
                        value={cells[cell]}
                        onChange={(event) =>
                          onChange(withCells(text, { line, cell }, [[event.currentTarget.value]]))
                        }
                        onKeyDown={(event) => key(event, line, cell)}
                        onPaste={(event) => paste(event, line, cell)}
                      />
                    </td>
                  );
                })}
                {!isReadOnly && (
                  <td>
                    <ActionIcon
                      variant="subtle"
                      size="sm"
                      aria-label={`Remove quote ${line + 1}`}
                      onClick={() => keep(lines.filter((_, k) => k !== line))}
                    >
                      ×
                    </ActionIcon>
                  </td>
                )}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {problems.length > 0 && (
        <ul className={styles.reasons} aria-label={`What does not fit in the quotes of ${name}`}>
          {problems.map(({ line, cell, message }) => (
            <li key={`${line}:${cell}:${message}`}>{message}</li>
          ))}
        </ul>
      )}
      {!isReadOnly && (
        <Group mt={4}>
          <Button
            size="compact-xs"
            variant="default"
            onClick={() =>
              keep([
                ...lines,
                [lines.at(-1)?.[0] ?? "", lines.at(-1)?.[2] ?? "", "", lines.at(-1)?.[3] ?? "", ""],
              ])
            }
          >
            Add a quote
          </Button>
        </Group>
      )}
    </div>
  );
}
