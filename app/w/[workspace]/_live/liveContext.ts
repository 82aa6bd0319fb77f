"use client";

import { createContext, useContext, useEffect, useRef } from "react";
import type { LiveEvent, LookingAt } from "./connection";

type Listener = (event: LiveEvent) => void;

/** The workspace's one live connection, for what stands on the page. */
export interface LiveAtHand {
  subscribe(listener: Listener): () => void;
  readonly lookingAt: LookingAt;
  readonly userId: string;
}

export const LiveContext = createContext<LiveAtHand | null>(null);

/** Tells a component of the workspace's events while it is on screen. */
export function useLiveEvents(listener: Listener): void {
  const subscribe = useContext(LiveContext)?.subscribe;
  const latest = useRef(listener);
  latest.current = listener;
  useEffect(() => subscribe?.((event) => latest.current(event)), [subscribe]);
}

/** The other people who look at a deal now. */
export function useOthersAt(dealId: string | undefined): readonly { userId: string; name: string }[] {
  const live = useContext(LiveContext);
  if (!live || dealId === undefined) return [];
  return (live.lookingAt[dealId] ?? []).filter(({ userId }) => userId !== live.userId);
}
