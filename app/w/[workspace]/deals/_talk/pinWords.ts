import type { Pin } from "@/lib/discussion/queries";

/** What a thread is pinned to, in words. */
export function pinWords(pin: Pin): string {
  switch (pin.kind) {
    case "deal":
      return "The deal";
    case "class":
      return `Class ${pin.label}${pin.isGone ? ", which the deal no longer has" : ""}`;
    case "name":
      return `Name ${pin.label}${pin.isGone ? ", which the pool no longer has" : ""}`;
    case "quote":
      return `Quote ${pin.label}`;
    case "figure":
      return `${pin.label}, run ${pin.run}`;
  }
}
