/** What stands in the way of a value: `path` is relative to the thing that was built. */
export interface QuantProblem {
  readonly code: string;
  readonly path: string;
  readonly message: string;
  readonly value?: unknown;
}

/** A value, or the problems that prevent it: errors are data. */
export type Outcome<Value> =
  | { readonly ok: true; readonly value: Value }
  | { readonly ok: false; readonly problems: readonly QuantProblem[] };

export function success<Value>(value: Value): Outcome<Value> {
  return { ok: true, value };
}

export function failure(code: string, path: string, message: string, value?: unknown): Outcome<never> {
  return { ok: false, problems: [{ code, path, message, value }] };
}
