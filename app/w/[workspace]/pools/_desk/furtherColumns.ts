import type { CreditColumn } from "@/lib/pools/grid";

/** Credit columns that can be added to a pool that does not use them yet. */
export const furtherColumns: readonly { readonly label: string; readonly column: CreditColumn }[] = [
  ...[1, 2, 3, 5, 7, 10].map((years) => ({
    label: `Spread ${years}Y`,
    column: { field: "spread" as const, years },
  })),
  { label: "Yearly default probability", column: { field: "yearly", years: null } },
  ...[1, 3, 5, 10].map((years) => ({
    label: `Default probability to ${years}Y`,
    column: { field: "cumulative" as const, years },
  })),
  { label: "Hazard rate", column: { field: "hazard", years: null } },
  { label: "Upfront 5Y and coupon", column: { field: "upfront", years: 5 } },
  { label: "Status (defaulted)", column: { field: "status", years: null } },
];
