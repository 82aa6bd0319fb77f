import type { PricingProblem } from "../problem";
import { asObject, valueAt } from "./loose";

/** A problem whose words name the row's id, the field and the value. */
export function problem(code: string, path: readonly string[], raw: unknown, words: string): PricingProblem {
  const value = valueAt(raw, path);
  return {
    code,
    path: path.join("."),
    ...(isPlain(value) ? { value } : {}),
    message: sentence(path, raw, value, words),
  };
}

function isPlain(value: unknown): boolean {
  return ["string", "number", "boolean"].includes(typeof value) || value === null;
}

function sentence(path: readonly string[], raw: unknown, value: unknown, words: string): string {
  const subject = subjectOf(path, raw);
  const shown = isPlain(value)
    ? ` (it is ${typeof value === "string" ? `"${value.slice(0, 60)}"` : String(value)})`
    : "";
  return `${subject} ${words}${shown}.`;
}

const rowWords: Record<string, string> = {
  pool: "Name",
  tranches: "Tranche",
  quotes: "Quote",
  nodes: "node",
  holidays: "holiday",
  nthToDefault: "Contract",
};

function subjectOf(path: readonly string[], raw: unknown): string {
  const parts: string[] = [];
  for (let i = 0; i < path.length; i++) {
    const step = path[i]!;
    const next = path[i + 1];
    const rows = rowWords[step];
    if (rows && next !== undefined && /^\d+$/.test(next)) {
      const { id } = asObject(valueAt(raw, path.slice(0, i + 2)));
      parts.push(
        typeof id === "string" && id !== ""
          ? `${rows} ${id.slice(0, 60)} (row ${Number(next) + 1})`
          : `${rows} ${Number(next) + 1}`,
      );
      i++;
    } else parts.push(step);
  }
  const text = parts.join(", ") || "The request";
  return text.charAt(0).toUpperCase() + text.slice(1);
}
