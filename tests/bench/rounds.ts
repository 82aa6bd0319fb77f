/** What is timed: one run's milliseconds, in every round or only in the first few where it is slow. */
export interface Arm {
  readonly run: () => number | Promise<number>;
  readonly most?: number;
}

export interface Timing {
  readonly minimum: number;
  readonly median: number;
}

/** Runs arms in turn, round after round, so that a noisy machine is noisy for all of them. */
export async function interleaved(
  arms: ReadonlyMap<string, Arm>,
  rounds: number,
): Promise<Map<string, Timing>> {
  const taken = new Map<string, number[]>([...arms.keys()].map((name) => [name, []]));
  for (let round = 0; round < rounds; round++)
    for (const [name, { run, most }] of arms)
      if (round < (most ?? rounds)) taken.get(name)!.push(await run());
  return new Map([...taken].map(([name, times]) => [name, timing(times)]));
}

function timing(times: readonly number[]): Timing {
  const sorted = [...times].sort((one, other) => one - other);
  return { minimum: sorted[0]!, median: sorted[Math.floor(sorted.length / 2)]! };
}

/** Milliseconds of a synchronous piece of work. */
export function timed(work: () => unknown, most?: number): Arm {
  const run = () => {
    const start = performance.now();
    work();
    return performance.now() - start;
  };
  return most === undefined ? { run } : { run, most };
}
