/** One entry of data/published.json. */
export interface Published {
  readonly id: string;
  readonly topic: string;
  readonly source: string;
  readonly where: string;
  /** Whether the figure was read in a copy of its source, or is from memory. */
  readonly basis: string;
  readonly inputs: Readonly<Record<string, unknown>>;
  readonly value: number | readonly number[];
  readonly recomputed: number | readonly number[];
  readonly absoluteTolerance: number;
  readonly note?: string;
}

/** How the core is led to a published figure, by the source's own convention. */
export interface Check {
  readonly of: RegExp;
  /** The figures, in the order and the units of the entry. */
  compute(entry: Published): readonly number[];
  /** Largest difference from the entry's independent recomputation, relative to 1 or the figure; 1e-9 unless told. */
  readonly agreement?: number;
  /** Set where the source's figure is itself an approximation: allowed instead of its rounding, with the reason. */
  readonly approximation?: { readonly tolerance: number; readonly because: string };
}

/** Number at a key of an entry's inputs. */
export function input({ id, inputs }: Published, key: string): number {
  const value = inputs[key];
  if (typeof value !== "number") throw new Error(`${id} has no number ${key}`);
  return value;
}

/** Numbers at a key of an entry's inputs. */
export function inputs({ id, inputs }: Published, key: string): readonly number[] {
  const value = inputs[key];
  if (!Array.isArray(value)) throw new Error(`${id} has no list ${key}`);
  return value as number[];
}
