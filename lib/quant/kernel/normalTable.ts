import { normalCdf, normalDensity } from "../maths/normal";

/** Where the table of the normal law stands in a backend's memory, and where free memory begins. */
export const NORMAL_TABLE = 4096;
export const FREE_MEMORY = 32_768;

const ENTRIES = 22 * 64 + 1;

/** Writes Φ and φ every 1/64 from −13 to 9, pair by pair; the first pair is zero, so that clamped numbers give 0. */
export function writeNormalTable(memory: ArrayBuffer): void {
  const table = new Float64Array(memory, NORMAL_TABLE, 2 * ENTRIES);
  for (let j = 1; j < ENTRIES; j++) {
    const x = j / 64 - 13;
    table[2 * j] = normalCdf(x);
    table[2 * j + 1] = normalDensity(x);
  }
}
