import type { NameInput } from "../pricing/request";
import { type CreditColumn, cellText, type GridColumn, valueIn } from "./grid";
import type { ImportProblem } from "./import/cells";
import { columnFields, textFields } from "./import/columns";
import { readNumber } from "./import/numbers";
import { readRow } from "./import/row";

/** What someone has typed into a pool and not yet saved, by row and column; it can be laid over any version of the pool. */
export interface PoolDraft {
  /** The pool's version when the typing began. */
  readonly version: number;
  /** Typed texts: row key → column key → text. A row's key is the id it was saved under, or a made one for added rows. */
  readonly typed: Readonly<Record<string, Readonly<Record<string, string>>>>;
  /** Keys of added rows, in order. */
  readonly added: readonly string[];
  /** Keys of removed rows. */
  readonly removed: readonly string[];
}

/** A row of the grid: the saved name with the draft laid over it. */
export interface DraftRow {
  readonly key: string;
  readonly saved: NameInput | null;
  readonly typed: Readonly<Record<string, string>>;
  /** The name to be saved, or null while the row has problems. */
  readonly name: NameInput | null;
  readonly problems: readonly ImportProblem[];
}

export function emptyDraft(version: number): PoolDraft {
  return { version, typed: {}, added: [], removed: [] };
}

export function isEmpty({ typed, added, removed }: PoolDraft): boolean {
  return Object.keys(typed).length + added.length + removed.length === 0;
}

/** One cell as typed. */
export interface TypedCell {
  readonly row: Pick<DraftRow, "key" | "saved">;
  readonly column: GridColumn;
  readonly text: string;
}

/** Credit columns that something was typed into: they are shown even where no saved name uses them. */
export function typedColumns({ typed }: PoolDraft): CreditColumn[] {
  const keys = new Set(Object.values(typed).flatMap((cells) => Object.keys(cells)));
  return [...keys].flatMap((key) => {
    const [name, years] = key.split(" ");
    const field = columnFields.find((known) => known === name);
    const isCredit = field && !["id", "name", "sector", "notional", "recovery", "loading"].includes(field);
    return isCredit ? [{ field, years: years ? Number(years) : null }] : [];
  });
}

/** The draft with cells typed, one or a pasted block. */
export function withTypedCells(draft: PoolDraft, cells: readonly TypedCell[]): PoolDraft {
  return cells.reduce(
    (laid, { row, column, text }) => withTyped(laid, row.key, column, text, row.saved),
    draft,
  );
}

/** The draft with one cell typed; typing what is saved there takes the cell out of the draft again. */
export function withTyped(
  draft: PoolDraft,
  key: string,
  column: GridColumn,
  text: string,
  saved: NameInput | null,
): PoolDraft {
  const { [column.key]: _, ...others } = draft.typed[key] ?? {};
  const isBack = saved !== null && cellText(valueIn(saved, column), column.unit) === text.trim();
  const row = isBack ? others : { ...others, [column.key]: text };
  const { [key]: __, ...rest } = draft.typed;
  return { ...draft, typed: Object.keys(row).length === 0 ? rest : { ...rest, [key]: row } };
}

/** The draft with an empty row at the end. */
export function withAdded(draft: PoolDraft, key: string): PoolDraft {
  return { ...draft, added: [...draft.added, key] };
}

/** The draft with a row taken away, whether saved or only added. */
export function withRemoved(draft: PoolDraft, key: string): PoolDraft {
  const { [key]: _, ...typed } = draft.typed;
  if (draft.added.includes(key))
    return { ...draft, typed, added: draft.added.filter((other) => other !== key) };
  return { ...draft, typed, removed: [...draft.removed, key] };
}

/**
 * Lays a draft over saved names. Untouched rows keep their name as it is; touched ones are read by the import's rules, with
 * the same words. Rows of the draft that are no longer saved come back as added ones, so that nothing typed is lost.
 */
export function applyDraft(
  names: readonly NameInput[],
  columns: readonly GridColumn[],
  draft: PoolDraft,
): DraftRow[] {
  const removed = new Set(draft.removed);
  const known = new Set(names.map(({ id }) => id));
  const orphans = Object.keys(draft.typed).filter((key) => !known.has(key) && !draft.added.includes(key));
  const entries = [
    ...names.filter(({ id }) => !removed.has(id)).map((saved) => ({ key: saved.id, saved })),
    ...[...orphans, ...draft.added].map((key) => ({ key, saved: null })),
  ];
  const seen = new Map<string, number>();
  return entries.map(({ key, saved }, i) => {
    const typed = draft.typed[key] ?? {};
    if (saved && Object.keys(typed).length === 0 && !seen.has(saved.id)) {
      seen.set(saved.id, i + 1);
      return { key, saved, typed, name: saved, problems: [] };
    }
    const { name, problems } = readRow({ line: i + 1, cells: cellsOf(saved, typed, columns) }, columns, seen);
    return { key, saved, typed, name, problems };
  });
}

function cellsOf(
  saved: NameInput | null,
  typed: Readonly<Record<string, string>>,
  columns: readonly GridColumn[],
): string[] {
  return columns.map((column) => {
    const text = typed[column.key];
    if (text === undefined) return saved ? cellText(valueIn(saved, column), column.unit) : "";
    return textFields.includes(column.field) ? text.trim() : withPoint(text.trim());
  });
}

/** A typed number with a decimal point, whichever mark it was typed with. */
function withPoint(text: string): string {
  if (readNumber(text, ".") || !readNumber(text, ",")) return text;
  return text.replaceAll(".", "").replace(",", ".");
}
