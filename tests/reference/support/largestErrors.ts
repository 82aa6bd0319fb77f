interface Worst {
  readonly error: number;
  readonly allowed: number;
  readonly at: string;
  readonly largest: number;
}

/** The largest error met per topic, printed when a file of checks ends: a margin is worth more than a green light. */
export class LargestErrors {
  private readonly worst = new Map<string, Worst>();

  constructor(private readonly title: string) {}

  /** Notes an error beside what is allowed: per topic the largest, and the one closest to its allowance. */
  note(topic: string, error: number, allowed: number, at: string): void {
    const before = this.worst.get(topic);
    const largest = Math.max(error, before?.largest ?? 0);
    const isWorse = !before || error / allowed > before.error / before.allowed;
    this.worst.set(topic, isWorse ? { error, allowed, at, largest } : { ...before, largest });
  }

  /** Writes one line a topic. */
  print(): void {
    const rows = [...this.worst].map(
      ([topic, { error, allowed, at, largest }]) =>
        `  ${topic.padEnd(28)} largest ${largest.toExponential(1)}; closest to its limit ${error.toExponential(1)} of ${allowed.toExponential(1)} (${at})`,
    );
    process.stdout.write(`${[this.title, ...rows.sort()].join("\n")}\n`);
  }
}
