/** The rooms of a deal's desk, in the order of their tabs. `slug` is the room's part of the address. */
export const rooms = [
  { slug: "", label: "Structure" },
  { slug: "pool", label: "Pool" },
  { slug: "correlation", label: "Correlation" },
  { slug: "order", label: "Order" },
  { slug: "drivers", label: "Drivers" },
  { slug: "stress", label: "Stress" },
  { slug: "sizing", label: "Sizing" },
  { slug: "runs", label: "Runs" },
  { slug: "talk", label: "Talk" },
  { slug: "sign-off", label: "Sign-off" },
  { slug: "history", label: "History" },
] as const satisfies readonly { slug: string; label: string }[];

export type Room = (typeof rooms)[number];

/** The address of a deal, or of one of its rooms. */
export function roomAddress(workspaceId: string, dealId: string, slug = ""): string {
  return `/w/${workspaceId}/deals/${dealId}${slug ? `/${slug}` : ""}`;
}
