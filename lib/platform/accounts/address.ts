/** The header that the server itself sets from the connection; what a client sends under this name is thrown away. */
export const ADDRESS_HEADER = "x-loadline-address";

/** The client's address as the server saw it. */
export function clientAddress(headers: Headers): string {
  return headers.get(ADDRESS_HEADER) ?? "unknown";
}

/**
 * The address to trust: the connection's own, or behind a trusted proxy the last one that the proxy added.
 */
export function trustedAddress(
  connection: string | undefined,
  forwarded: string | undefined,
  trustProxy: boolean,
): string {
  const last = forwarded?.split(",").at(-1)?.trim();
  return (trustProxy && last) || connection || "unknown";
}
