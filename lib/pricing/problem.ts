/** One thing wrong with a request; `path` is dotted (`pool.1.recovery`). */
export interface PricingProblem {
  readonly code: string;
  readonly path: string;
  readonly value?: unknown;
  readonly message: string;
}
