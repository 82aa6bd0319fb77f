import { sha256 } from "@noble/hashes/sha2.js";
import { bytesToHex, utf8ToBytes } from "@noble/hashes/utils.js";

/**
 * Canonical JSON: keys in code-unit order, absent fields dropped, −0 as 0, numbers in their shortest form. Two requests
 * that mean the same text have the same canonical form.
 */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value !== "object")
    return JSON.stringify(Object.is(value, -0) ? 0 : value) ?? "null";
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(",")}]`;
  const entries = Object.entries(value)
    .filter(([, field]) => field !== undefined)
    .sort(([one], [other]) => (one < other ? -1 : one > other ? 1 : 0))
    .map(([key, field]) => `${JSON.stringify(key)}:${canonicalJson(field)}`);
  return `{${entries.join(",")}}`;
}

/** SHA-256 of the canonical form, lower-case hex. */
export function requestHash(request: unknown): string {
  return bytesToHex(sha256(utf8ToBytes(canonicalJson(request))));
}
