/**
 * The instruction set of the recursion on a flat memory: WebAssembly with SIMD, or its twin in TypeScript, which gives the
 * same bits. Pointers are byte offsets into `memory`; what each function does stands in `assembly/recursion.ts`.
 */
export interface RecursionBackend {
  readonly kind: "wasm" | "twin";
  /** The memory as it is now; growing it replaces the buffer. */
  memory(): ArrayBuffer;
  /** Makes the memory at least this large, keeping what is in it. */
  reserve(bytes: number): void;
  conditional(
    count: number,
    scaled: number,
    slopes: number,
    factors: number,
    table: number,
    out: number,
  ): void;
  addNames(
    count: number,
    top: number,
    negligible: number,
    rows: number,
    steps: number,
    weights: number,
    sizes: number,
    probabilities: number,
    overflow: number,
    bounds: number,
  ): void;
  collect(
    rows: number,
    low: number,
    high: number,
    law: number,
    segments: number,
    breaks: number,
    masses: number,
    moments: number,
    stride: number,
  ): void;
  moments(
    count: number,
    scaled: number,
    slopes: number,
    sizes: number,
    factors: number,
    table: number,
    out: number,
  ): void;
  cumulants(
    count: number,
    scaled: number,
    slopes: number,
    sizes: number,
    factors: number,
    table: number,
    out: number,
  ): void;
  /** Row updates times factor values since the last call. */
  takeWork(): number;
}
