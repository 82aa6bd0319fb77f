import type { Problem } from "./errors";

/** A typed number with comma or point; undefined when empty, null when it is none. */
export function typedNumber(text: string): number | null | undefined {
  const plain = text
    .trim()
    .replace(/[\s\u202f\u00a0%]/g, "")
    .replace(",", ".");
  if (plain === "") return undefined;
  return /^-?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null;
}

/** The decimal meant by a number of percent or basis points, without binary crumbs. */
export function scaled(value: number, by: number): number {
  return Number((value / by).toPrecision(15));
}

/** A stored decimal as it is typed in percent or basis points. */
export function textOf(value: number | undefined, by: number): string {
  return value === undefined ? "" : String(Number((value * by).toPrecision(15)));
}

/** Reads numbers of a form, collecting every problem. */
export class NumberReader {
  readonly problems: Problem[] = [];

  /** The number typed at a path, divided by `by`; undefined, with a problem, where it does not read or is missing. */
  read(text: string, by: number, path: string, what: string, isNeeded: boolean): number | undefined {
    const value = typedNumber(text);
    if (value === null)
      this.problems.push({
        code: "number",
        path,
        value: text,
        message: `${what} must be a number (it is "${text}").`,
      });
    if (value === undefined && isNeeded)
      this.problems.push({ code: "missing", path, message: `${what} is missing.` });
    return value === null || value === undefined ? undefined : scaled(value, by);
  }
}
