"use client";

import { Alert } from "@mantine/core";
import { usePathname, useRouter } from "next/navigation";
import { type ReactNode, useCallback, useEffect, useMemo, useRef, useState } from "react";
import { SIGNED_OUT } from "@/app/_ui/call";
import { makePageFetchesPatient } from "@/app/_ui/patientFetch";
import { concerns } from "./concerns";
import { type Connection, keepConnected, type LiveEvent, type LiveState, type LookingAt } from "./connection";
import { LiveContext } from "./liveContext";
import { SignInAgain } from "./SignInAgain";

/** Events that come in a burst refresh the page once. */
const BURST = 120;

/** Keeps every page of a workspace as the server has it, and says when it cannot. */
export function Live({
  workspaceId,
  userId,
  since,
  children,
}: {
  workspaceId: string;
  userId: string;
  /** An event that the page, as it came from the server, has certainly seen. */
  since: string;
  children: ReactNode;
}) {
  const router = useRouter();
  const path = usePathname();
  const [state, setState] = useState<LiveState>("open");
  const [lookingAt, setLookingAt] = useState<LookingAt>({});
  const listeners = useRef(new Set<(event: LiveEvent) => void>());
  const connection = useRef<Connection | null>(null);
  const place = useRef(path);
  place.current = path;
  const first = useRef(since);
  const refresh = useRef(router.refresh);
  refresh.current = router.refresh;

  useEffect(makePageFetchesPatient, []);
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | null = null;
    let was: LiveState = "open";
    const soon = () => {
      timer ??= setTimeout(() => {
        timer = null;
        refresh.current();
      }, BURST);
    };
    const opened = keepConnected(workspaceId, dealOf(place.current), first.current, {
      event(event) {
        for (const listener of listeners.current) listener(event);
        if (concerns(event, place.current)) soon();
      },
      presence: setLookingAt,
      state(next) {
        if (next === "open" && was !== "open") soon();
        was = next;
        setState(next);
      },
    });
    connection.current = opened;
    const signedOut = () => setState("signedOut");
    window.addEventListener(SIGNED_OUT, signedOut);
    return () => {
      window.removeEventListener(SIGNED_OUT, signedOut);
      opened.end();
      if (timer) clearTimeout(timer);
    };
  }, [workspaceId]);
  useEffect(() => connection.current?.show(dealOf(path)), [path]);

  const subscribe = useCallback((listener: (event: LiveEvent) => void) => {
    listeners.current.add(listener);
    return () => {
      listeners.current.delete(listener);
    };
  }, []);
  const atHand = useMemo(() => ({ subscribe, lookingAt, userId }), [subscribe, lookingAt, userId]);
  return (
    <LiveContext.Provider value={atHand}>
      {state === "lost" && (
        <Alert color="yellow" role="status" mb="sm">
          The connection to the server is lost. The page catches up by itself when it is back; what you type
          is kept.
        </Alert>
      )}
      {state === "outside" && (
        <Alert color="yellow" role="status" mb="sm">
          You are no longer a member of this workspace. What you typed is kept in this browser.
        </Alert>
      )}
      {state === "signedOut" && <SignInAgain onDone={() => setState("open")} />}
      {children}
    </LiveContext.Provider>
  );
}

function dealOf(path: string): string | null {
  const [, deal] = /\/deals\/([^/]+)/.exec(path) ?? [];
  return deal === undefined || deal === "new" ? null : deal;
}
