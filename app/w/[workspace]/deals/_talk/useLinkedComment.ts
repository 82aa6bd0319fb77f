"use client";

import { usePathname, useSearchParams } from "next/navigation";
import { useEffect, useState } from "react";

const PREFIX = "#comment-";

/** The comment that the page's address leads to, brought into view: a page opened from within sets no target of its own. */
export function useLinkedComment(): string | null {
  const [linked, setLinked] = useState<string | null>(null);
  const place = `${usePathname()}?${useSearchParams()}`;
  // biome-ignore lint/correctness/useExhaustiveDependencies: the hash is read again whenever the address changes
  useEffect(() => {
    const read = () => {
      const { hash } = window.location;
      setLinked(hash.startsWith(PREFIX) ? hash.slice(PREFIX.length) : null);
    };
    read();
    window.addEventListener("hashchange", read);
    return () => window.removeEventListener("hashchange", read);
  }, [place]);
  useEffect(() => {
    if (linked) document.getElementById(`comment-${linked}`)?.scrollIntoView({ block: "center" });
  }, [linked]);
  return linked;
}
