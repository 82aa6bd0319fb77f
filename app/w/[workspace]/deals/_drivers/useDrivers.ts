"use client";

import { useMemo } from "react";
import { usePieces } from "@/app/_ui/usePieces";
import type { MarketDriver } from "@/lib/pricing/drivers";
import { isTakenAtOnce } from "@/lib/pricing/namesAtOnce";
import type { PricingRequest } from "@/lib/pricing/request";

/** Names worked out in one piece where each is a valuation of its own: few enough that progress shows and a stop is quick. */
const NAMES_A_PIECE = 4;

/** What drives the classes of a request, worked out in this browser: the market's inputs first, names as they come. */
export function useDrivers(request: PricingRequest | null) {
  const asked = useMemo(() => {
    if (!request || request.tranches.length === 0) return null;
    const bare = { ...request, nthToDefault: [], include: [] };
    const places = widestFirst(request);
    const size = isTakenAtOnce(bare) ? places.length : NAMES_A_PIECE;
    const pieces = Array.from({ length: Math.ceil(places.length / size) }, (_, i) => ({
      request: bare,
      places: places.slice(i * size, (i + 1) * size),
    }));
    return { key: JSON.stringify(bare), bare, pieces };
  }, [request]);
  const market = usePieces("marketDrivers", asked && `market ${asked.key}`, asked ? [asked.bare] : []);
  const [first] = market.outputs;
  const isReady = first?.ok === true;
  const names = usePieces("nameDrivers", asked && isReady ? `names ${asked.key}` : null, asked?.pieces ?? []);
  return {
    market: first?.ok ? first.classes : ([] as readonly MarketDriver[]),
    isMarketBusy: market.isBusy,
    problems:
      first && !first.ok
        ? first.problems
        : market.problem
          ? [{ code: "engine", path: "", message: market.problem }]
          : [],
    names,
    pieces: asked?.pieces.length ?? 0,
  };
}

/** Places of the pool's names, the largest first: they are what a reader looks for. */
function widestFirst({ pool }: PricingRequest): number[] {
  return pool
    .map((name, i) => ({ i, size: name.notional * (1 - name.recovery) }))
    .sort((one, other) => other.size - one.size || one.i - other.i)
    .map(({ i }) => i);
}
