import type { CorrelationInput } from "./request";

interface Correlated {
  readonly loading?: number | null | undefined;
  readonly sector?: string | null | undefined;
}

/** The correlation of two names' asset values; that of their defaults is another figure, and lower. Null under a base curve. */
export function assetCorrelation(
  correlation: CorrelationInput,
  one: Correlated,
  other: Correlated,
): number | null {
  switch (correlation.kind) {
    case "flat":
      return correlation.rho;
    case "loadings":
      return (one.loading ?? 0) * (other.loading ?? 0);
    case "sector":
      return one.sector === other.sector ? correlation.within : correlation.between;
    case "base":
      return null;
  }
}
