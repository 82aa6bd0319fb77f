import { randomUUID } from "node:crypto";

/** Where an open page stands: its workspace, its own name for itself, the deal that it shows. */
export function placeOf(asked: URLSearchParams): {
  workspaceId: string;
  page: string;
  dealId: string | null;
} {
  const part = (key: string, longest: number) => (asked.get(key) ?? "").slice(0, longest);
  return {
    workspaceId: part("workspace", 100),
    page: part("page", 64) || randomUUID(),
    dealId: part("deal", 100) || null,
  };
}
