"use client";

import { useEffect, useMemo, useRef, useState } from "react";
import { EngineLine } from "@/lib/compute/browserEngine";
import type { QuickCache } from "@/lib/pricing/quickCache";
import { type QuickFigures, quickFigures } from "@/lib/pricing/quickFigures";
import type { PricingRequest } from "@/lib/pricing/request";

/** A cache is begun only when what it rests on has stood still this long, milliseconds. */
const STILL = 400;

interface Kept {
  readonly key: string;
  readonly cache: QuickCache | null;
}

/**
 * Every class's figures at once while boundaries, coupons or correlations are dragged, read on this thread from a cache that a
 * worker of its own makes in the background. Null while there is none for this pool, its curves and dates; null for a class that
 * the cache does not reach. Exact figures follow from a full price.
 */
export function useQuickFigures(request: PricingRequest | null): readonly (QuickFigures | null)[] | null {
  const key = useMemo(() => (request ? cacheKey(request) : null), [request]);
  const [kept, setKept] = useState<Kept | null>(null);
  const latest = useRef(request);
  latest.current = request;
  useEffect(() => {
    if (key === null) return;
    let line: EngineLine | null = null;
    const timer = setTimeout(() => {
      line = new EngineLine();
      line
        .run("quickCache", latest.current)
        .then(
          (cache) => setKept({ key, cache }),
          // Without a cache every figure is priced afresh, which the page does anyway.
          () => setKept({ key, cache: null }),
        )
        .finally(() => line?.close());
    }, STILL);
    return () => {
      clearTimeout(timer);
      line?.close();
    };
  }, [key]);
  return useMemo(() => {
    if (!request || !kept?.cache || kept.key !== key) return null;
    return quickFigures(kept.cache, request);
  }, [request, kept, key]);
}

const texts = new WeakMap<object, string>();

/** What a cache rests on: all but the classes and what may be dragged of the correlation. */
function cacheKey({ pool, schedule, discount, pricingDate, law, correlation }: PricingRequest): string {
  const fixed =
    correlation.kind === "flat"
      ? "flat"
      : correlation.kind === "base" && "nodes" in correlation
        ? { index: correlation.index, mapping: correlation.mapping }
        : correlation;
  return [textOf(pool), JSON.stringify([schedule, discount, pricingDate, law, fixed])].join(" ");
}

/** A pool's text, once for each pool: it is long and stays the same through a drag. */
function textOf(part: object): string {
  let text = texts.get(part);
  if (text === undefined) {
    text = JSON.stringify(part);
    texts.set(part, text);
  }
  return text;
}
