import { allDigits, type FigureUnit } from "../figures";

/** One column of a table of figures. `unitWords` stands in the header, on screen and in what is taken away. */
export interface FigureColumn<Row> {
  readonly key: string;
  readonly header: string;
  readonly unit: FigureUnit | "text";
  readonly unitWords?: string;
  value(row: Row): number | string | null;
}

export function headerOf<Row>({ header, unitWords }: FigureColumn<Row>): string {
  return unitWords ? `${header} (${unitWords})` : header;
}

/** A cell as taken away: the number in its column's unit with all its digits, or the text. */
export function takenValue<Row>(column: FigureColumn<Row>, row: Row): number | string | null {
  const value = column.value(row);
  if (typeof value !== "number" || column.unit === "text") return value;
  return Number(allDigits(value, column.unit));
}
