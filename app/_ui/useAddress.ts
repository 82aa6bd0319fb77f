"use client";

import { useSearchParams } from "next/navigation";

/**
 * A choice of the reader that the page's address holds, so that a link shows a colleague the same. The default is left out
 * of the address.
 */
export function useAddress(key: string, otherwise: string): [string, (value: string) => void] {
  const parameters = useSearchParams();
  const choose = (value: string) => {
    const next = new URLSearchParams(window.location.search);
    if (value === otherwise) next.delete(key);
    else next.set(key, value);
    const query = next.toString();
    window.history.replaceState(null, "", query ? `?${query}` : window.location.pathname);
  };
  return [parameters.get(key) ?? otherwise, choose];
}
