import { type Cell, toCsv } from "../platform/csv";
import type { CreditInput, NameInput } from "../pricing/request";

interface Column {
  readonly header: string;
  cell(name: NameInput): Cell;
}

/** A pool's names as CSV, all decimals, with only the columns the pool needs; the import reads it back unchanged. */
export function poolCsv(names: readonly NameInput[]): string {
  const columns = [...plainColumns(names), ...creditColumns(names)];
  return toCsv(
    columns.map((column) => column.header),
    names.map((name) => columns.map((column) => column.cell(name))),
  );
}

function plainColumns(names: readonly NameInput[]): Column[] {
  const columns: Column[] = [
    { header: "Id", cell: ({ id }) => id },
    { header: "Name", cell: ({ name }) => name ?? "" },
    { header: "Sector", cell: ({ sector }) => sector ?? "" },
    { header: "Notional", cell: ({ notional }) => notional },
    { header: "Recovery", cell: ({ recovery }) => recovery },
  ];
  if (names.some(({ loading }) => loading !== undefined))
    columns.push({ header: "Loading", cell: ({ loading }) => loading ?? null });
  return columns;
}

function creditColumns(names: readonly NameInput[]): Column[] {
  const has = (kind: CreditInput["kind"]) => names.some(({ credit }) => credit.kind === kind);
  const columns: Column[] = [];
  for (const years of yearsOf(names, "spread")) {
    const cell = ({ credit }: NameInput) =>
      credit.kind === "spread" ? (credit.nodes.find((node) => node.years === years)?.spread ?? null) : null;
    columns.push({ header: `Spread ${years}Y (decimal)`, cell });
  }
  for (const years of yearsOf(names, "cumulative")) {
    const cell = ({ credit }: NameInput) =>
      credit.kind === "cumulative"
        ? (credit.nodes.find((node) => node.years === years)?.probability ?? null)
        : null;
    columns.push({ header: `Cumulative PD ${years}Y (decimal)`, cell });
  }
  if (has("yearly")) {
    const cell = ({ credit }: NameInput) => (credit.kind === "yearly" ? credit.probability : null);
    columns.push({ header: "Yearly PD (decimal)", cell });
  }
  if (has("hazard"))
    columns.push({
      header: "Hazard rate",
      cell: ({ credit }) => (credit.kind === "hazard" ? credit.rate : null),
    });
  for (const years of yearsOf(names, "upfront")) {
    const cell = ({ credit }: NameInput) =>
      credit.kind === "upfront" && credit.years === years ? credit.upfront : null;
    columns.push({ header: `Upfront ${years}Y (decimal)`, cell });
  }
  if (has("upfront")) {
    const cell = ({ credit }: NameInput) => (credit.kind === "upfront" ? credit.coupon : null);
    columns.push({ header: "Coupon (decimal)", cell });
  }
  if (has("defaulted"))
    columns.push({
      header: "Status",
      cell: ({ credit }) => (credit.kind === "defaulted" ? "defaulted" : ""),
    });
  return columns;
}

function yearsOf(names: readonly NameInput[], kind: "spread" | "cumulative" | "upfront"): number[] {
  const years = names.flatMap(({ credit }) => {
    if (credit.kind !== kind) return [];
    return credit.kind === "upfront" ? [credit.years] : credit.nodes.map((node) => node.years);
  });
  return [...new Set(years)].sort((one, other) => one - other);
}
