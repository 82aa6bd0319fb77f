import type { MarketForm } from "@/lib/markets/form";

/** What each group of fields gets: the form as typed, problems by path, and how to change it. */
export interface FieldsProps {
  readonly form: MarketForm;
  readonly problems: Readonly<Record<string, string>>;
  readonly isReadOnly: boolean;
  onChange(part: Partial<MarketForm>): void;
}

/** The words beside a field, or nothing. */
export function problemAt(problems: FieldsProps["problems"], path: string): string | null {
  return problems[path] ?? null;
}

/** The words of every problem at or below a path. */
export function problemsBelow(problems: FieldsProps["problems"], path: string): string | null {
  const found = Object.entries(problems).filter(([at]) => at === path || at.startsWith(`${path}.`));
  return found.length === 0 ? null : found.map(([, message]) => message).join(" ");
}
