/** What each kind of entry is called. */
const kinds: Readonly<Record<string, string>> = {
  "workspace.created": "made the workspace",
  "workspace.renamed": "renamed the workspace",
  "member.invited": "invited someone",
  "member.revoked": "took an invitation back",
  "member.joined": "joined",
  "member.roleChanged": "changed a role",
  "member.removed": "removed a member",
  "member.left": "left",
  "pool.created": "stored a pool",
  "pool.saved": "saved a pool",
  "pool.copied": "copied a pool",
  "pool.archived": "archived a pool",
  "pool.restored": "brought a pool back",
  "market.created": "stored a market",
  "market.saved": "saved a market",
  "market.archived": "archived a market",
  "market.restored": "brought a market back",
  "deal.created": "stored a deal",
  "deal.saved": "saved a deal",
  "deal.copied": "copied a deal",
  "deal.archived": "archived a deal",
  "deal.restored": "brought a deal back",
  "deal.versionRestored": "took an older version of a deal again",
  "run.priced": "priced a run",
  "review.asked": "asked for a review",
  "review.signed": "signed a run off",
  "review.sentBack": "sent a run back",
  "review.withdrawn": "withdrew a review",
  "review.settingsSaved": "changed what a review needs",
  "comment.posted": "started a thread",
  "comment.replied": "replied",
  "comment.edited": "edited a comment",
  "comment.deleted": "deleted a comment",
  "thread.resolved": "resolved a thread",
  "thread.reopened": "reopened a thread",
};

/** An entry's kind in words; one without words of its own is split into its parts. */
export function activityWords(kind: string): string {
  return kinds[kind] ?? kind.replace(".", ": ").replace(/([A-Z])/g, (letter) => ` ${letter.toLowerCase()}`);
}

/** One field that an entry changed. */
export interface FieldChange {
  readonly path: string;
  readonly before: unknown;
  readonly after: unknown;
}

const MOST_CHANGES = 400;

/** The fields in which two values differ, by dotted path; rows of lists are told by their id, key or place. */
export function fieldChanges(before: unknown, after: unknown, path = ""): FieldChange[] {
  if (JSON.stringify(before) === JSON.stringify(after)) return [];
  const [one, other] = [partsOf(before), partsOf(after)];
  if (!one || !other) return [{ path, before: before ?? null, after: after ?? null }];
  const keys = [...new Set([...Object.keys(one), ...Object.keys(other)])];
  return keys
    .flatMap((key) => fieldChanges(one[key], other[key], path === "" ? key : `${path}.${key}`))
    .slice(0, MOST_CHANGES);
}

function partsOf(value: unknown): Record<string, unknown> | null {
  if (Array.isArray(value))
    return Object.fromEntries(
      value.map((row, i) => {
        const { id, key } = (row ?? {}) as { id?: unknown; key?: unknown };
        return [String(id ?? key ?? i + 1), row];
      }),
    );
  return value !== null && typeof value === "object" ? (value as Record<string, unknown>) : null;
}
