import type { RecursionBackend } from "./instructions";
import { writeNormalTable } from "./normalTable";
import { RECURSION_MODULE } from "./recursionModule.generated";
import { twinBackend } from "./twin";

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
    cumulants: functions.cumulants,
    takeWork: functions.takeWork,
  };
}

let chosen: RecursionBackend | null = null;

/** The backend of this thread, instantiated once. */
export function recursionBackend(): RecursionBackend {
  chosen ??= wasmBackend() ?? twinBackend();
  return chosen;
}
