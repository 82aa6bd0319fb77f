import Papa from "papaparse";
import type { NameInput } from "../pricing/request";

/** A text cell that a spreadsheet would take for a formula gets a leading apostrophe; numbers never do. */
export function safeCell(text: string): string {
  return /^[=+\-@\t\r]/.test(text) ? `'${text}` : text;
}

/** Rows as CSV with a byte-order mark, text cells made safe, numbers in full. */
export function toCsv(
  headers: readonly string[],
  rows: readonly (readonly (string | number | null)[])[],
): string {
  const cells = rows.map((row) => row.map((cell) => (typeof cell === "string" ? safeCell(cell) : cell)));
  return `﻿${Papa.unparse({ fields: [...headers], data: cells })}\r\n`;
}

/** A pool's names as CSV that can be imported again. */
export function poolCsv(names: readonly NameInput[]): string {
  const tenors = (kind: "spread" | "cumulative") =>
    [
      ...new Set(
        names.flatMap(({ credit }) =>
          credit.kind === kind && "nodes" in credit ? credit.nodes.map((node) => node.years) : [],
        ),
      ),
    ].sort((a, b) => a - b);
  const spreadYears = tenors("spread");
  const cumulativeYears = tenors("cumulative");
  const has = (kind: NameInput["credit"]["kind"]) => names.some(({ credit }) => credit.kind === kind);
  const headers = [
    "Id",
    "Name",
    "Sector",
    "Notional",
    "Recovery",
    ...(names.some((name) => name.loading !== undefined) ? ["Loading"] : []),
    ...spreadYears.map((years) => `Spread ${years}Y`),
    ...cumulativeYears.map((years) => `Cumulative PD ${years}Y`),
    ...(has("yearly") ? ["Yearly PD"] : []),
    ...(has("hazard") ? ["Hazard rate"] : []),
    ...(has("upfront") ? ["Upfront 5Y", "Coupon"] : []),
  ];
  const rows = names.map(({ id, name, sector, notional, recovery, loading, credit }) => [
    id,
    name ?? "",
    sector ?? "",
    notional,
    recovery,
    ...(headers.includes("Loading") ? [loading ?? null] : []),
    ...spreadYears.map((years) =>
      credit.kind === "spread" ? (credit.nodes.find((node) => node.years === years)?.spread ?? null) : null,
    ),
    ...cumulativeYears.map((years) =>
      credit.kind === "cumulative"
        ? (credit.nodes.find((node) => node.years === years)?.probability ?? null)
        : null,
    ),
    ...(has("yearly") ? [credit.kind === "yearly" ? credit.probability : null] : []),
    ...(has("hazard") ? [credit.kind === "hazard" ? credit.rate : null] : []),
    ...(has("upfront") ? (credit.kind === "upfront" ? [credit.upfront, credit.coupon] : [null, null]) : []),
  ]);
  return toCsv(headers, rows);
}
