/** One line of the bench. Times in milliseconds. */
export interface BenchRow {
  readonly group: string;
  readonly name: string;
  readonly minimum: number;
  readonly median: number;
  readonly ratios: Readonly<Record<string, number>>;
  /** Row updates times factor values: the same on every machine. */
  readonly work?: number;
  /** Largest difference from the yardstick's values. */
  readonly difference?: number | null;
}

/** The bench as lines of text, one group after another. */
export function benchText(rows: readonly BenchRow[]): string {
  const groups = [...new Set(rows.map((row) => row.group))];
  return groups
    .flatMap((group) => ["", group, ...rows.filter((row) => row.group === group).map(rowText)])
    .join("\n");
}

function rowText({ difference, median, minimum, name, ratios, work }: BenchRow): string {
  const parts = [
    `  ${name.padEnd(44)}`,
    `min ${milliseconds(minimum)}`,
    `median ${milliseconds(median)}`,
    ...Object.entries(ratios).map(([of, ratio]) => `${of} ${ratio.toPrecision(3)}`),
    ...(work ? [`work ${(work / 1e6).toFixed(2)} M`] : []),
    ...(difference === null || difference === undefined ? [] : [`differs ${difference.toExponential(0)}`]),
  ];
  return parts.join("  ");
}

function milliseconds(value: number): string {
  return `${value.toPrecision(4)} ms`.padStart(12);
}
