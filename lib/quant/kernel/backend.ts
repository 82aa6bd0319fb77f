import { writeNormalTable } from "./normalTable";
import { RECURSION_MODULE } from "./recursionModule.generated";
import { twinBackend } from "./twin";

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
  /** Row updates times factor values since the last call. */
  takeWork(): number;
}

const PAGE = 65_536;

/** The WebAssembly backend, or null where the machine has no SIMD. Small enough to be instantiated at once. */
export function wasmBackend(): RecursionBackend | null {
  if (typeof WebAssembly === "undefined") return null;
  const bytes = Uint8Array.from(atob(RECURSION_MODULE), (letter) => letter.charCodeAt(0));
  if (!WebAssembly.validate(bytes)) return null;
  const instance = new WebAssembly.Instance(new WebAssembly.Module(bytes), {});
  const memory = instance.exports.memory as WebAssembly.Memory;
  writeNormalTable(memory.buffer);
  const functions = instance.exports as unknown as Omit<RecursionBackend, "kind" | "memory" | "reserve">;
  return {
    kind: "wasm",
    memory: () => memory.buffer,
    reserve: (bytes) => {
      const missing = bytes - memory.buffer.byteLength;
      if (missing > 0) memory.grow(Math.ceil(missing / PAGE));
    },
    conditional: functions.conditional,
    addNames: functions.addNames,
    collect: functions.collect,
    moments: functions.moments,
    takeWork: functions.takeWork,
  };
}

let chosen: RecursionBackend | null = null;

/** The backend of this thread, instantiated once. */
export function recursionBackend(): RecursionBackend {
  chosen ??= wasmBackend() ?? twinBackend();
  return chosen;
}
