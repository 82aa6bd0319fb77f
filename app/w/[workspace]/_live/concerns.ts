import type { LiveEvent } from "./connection";

/** Rooms of a deal whose pages show its threads or marks of them; "" is the structure. */
const ROOMS_WITH_TALK = new Set(["", "correlation", "drivers", "runs", "talk"]);

/** Whether what a page shows may have changed by an event, so that it must be asked for again. */
export function concerns({ dealId, kind }: Pick<LiveEvent, "dealId" | "kind">, path: string): boolean {
  const [, , , room = "", open = "", place = ""] = path.split("/");
  const about = kind.slice(0, kind.indexOf("."));
  // Who may do what, and how much is unread, stands on every page.
  if (["member", "workspace", "notice"].includes(about)) return true;
  if (about === "job") return false;
  if (room === "activity") return true;
  if (room === "deals" && open !== "" && open !== "new") {
    if (about === "pool" || about === "market") return true;
    if (dealId !== open) return dealId === null && about !== "invitation";
    return about === "comment" || about === "thread" ? ROOMS_WITH_TALK.has(place) : true;
  }
  const shown: Record<string, readonly string[]> = {
    deals: ["deal", "run", "review", "pool", "market"],
    pools: ["pool", "deal"],
    markets: ["market", "deal"],
    people: ["invitation", "review"],
    inbox: ["deal"],
  };
  return shown[room]?.includes(about) ?? true;
}
