import Papa from "papaparse";
import { readHeader } from "./columns";

/** A pasted or exported table, cut into its parts; `firstRow` is the line number of the first row of data, from 1. */
export interface ImportTable {
  readonly headers: readonly string[];
  readonly rows: readonly { readonly line: number; readonly cells: readonly string[] }[];
  /** Lines above the header that were left out. */
  readonly titleLines: number;
}

const MOST_TITLE_LINES = 20;

/** Cuts text into a table: delimiter guessed, blank lines left out, the header is the first line with known columns. */
export function readTable(text: string): ImportTable | null {
  const { data } = Papa.parse<string[]>(text.replace(/^﻿/, ""), {
    delimitersToGuess: ["\t", ";", ",", "|"],
    skipEmptyLines: false,
  });
  const lines = data.map((cells, i) => ({ line: i + 1, cells: cells.map((cell) => cell.trim()) }));
  const filled = lines.filter(({ cells }) => cells.some((cell) => cell !== ""));
  const header = headerIndex(filled.map(({ cells }) => cells));
  if (header === null) return null;
  return { headers: filled[header]!.cells, rows: filled.slice(header + 1), titleLines: header };
}

/** The line with the most recognised headers among the first ones; at least two. */
function headerIndex(lines: readonly (readonly string[])[]): number | null {
  let best: number | null = null;
  let most = 1;
  for (const [i, cells] of lines.slice(0, MOST_TITLE_LINES).entries()) {
    const known = new Set(
      cells
        .filter((cell) => /[a-z]/i.test(cell))
        .map((cell) => JSON.stringify({ ...readHeader(cell), header: "" })),
    );
    const count = [...known].filter((reading) => !reading.includes('"ignore"')).length;
    if (count > most) {
      most = count;
      best = i;
    }
  }
  return best;
}
