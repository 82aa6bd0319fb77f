/** A JSON object whose fields are not known yet. */
export type Loose = Readonly<Record<string, unknown>>;

/** The value as an object; an empty one when it is none. */
export function asObject(value: unknown): Loose {
  return typeof value === "object" && value !== null && !Array.isArray(value) ? (value as Loose) : {};
}

/** The value as a list; an empty one when it is none. */
export function asArray(value: unknown): readonly unknown[] {
  return Array.isArray(value) ? value : [];
}

/** Whether the value is a finite number. */
export function isNumber(value: unknown): value is number {
  return typeof value === "number" && Number.isFinite(value);
}

/** The value at a path, undefined where the path leads nowhere. */
export function valueAt(raw: unknown, path: readonly string[]): unknown {
  let value = raw;
  for (const step of path)
    value =
      typeof value === "object" && value !== null ? (value as Record<string, unknown>)[step] : undefined;
  return value;
}
