"use client";

import { Alert } from "@mantine/core";
import { usePathname, useRouter } from "next/navigation";
import { createContext, type ReactNode, useCallback, useContext, useEffect, useRef, useState } from "react";
import { SIGNED_OUT } from "@/app/_ui/call";
import { makePageFetchesPatient } from "@/app/_ui/patientFetch";
import { keepConnected, type LiveEvent, type LiveState } from "./connection";
import { SignInAgain } from "./SignInAgain";

/** Events that come in a burst refresh the page once. */
const BURST = 120;

type Listener = (event: LiveEvent) => void;

const LiveContext = createContext<((listener: Listener) => () => void) | null>(null);

/** Tells a component of the workspace's events while it is on screen. */
export function useLiveEvents(listener: Listener): void {
  const subscribe = useContext(LiveContext);
  const latest = useRef(listener);
  latest.current = listener;
  useEffect(() => subscribe?.((event) => latest.current(event)), [subscribe]);
}

/** Keeps every page of a workspace as the server has it, and says when it cannot. */
export function Live({ workspaceId, children }: { workspaceId: string; children: ReactNode }) {
  const router = useRouter();
  const path = usePathname();
  const [state, setState] = useState<LiveState>("open");
  const listeners = useRef(new Set<Listener>());
  const place = useRef(path);
  place.current = path;
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
    const end = keepConnected(
      workspaceId,
      (event) => {
        for (const listener of listeners.current) listener(event);
        if (concerns(event, place.current)) soon();
      },
      (next) => {
        if (next === "open" && was !== "open") soon();
        was = next;
        setState(next);
      },
    );
    const signedOut = () => setState("signedOut");
    window.addEventListener(SIGNED_OUT, signedOut);
    return () => {
      window.removeEventListener(SIGNED_OUT, signedOut);
      end();
      if (timer) clearTimeout(timer);
    };
  }, [workspaceId]);

  const subscribe = useCallback((listener: Listener) => {
    listeners.current.add(listener);
    return () => {
      listeners.current.delete(listener);
    };
  }, []);
  return (
    <LiveContext.Provider value={subscribe}>
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

/** A page of one deal is not refreshed for what happens in another. */
function concerns({ dealId, kind }: LiveEvent, path: string): boolean {
  if (kind.startsWith("job.")) return false;
  const [, open] = /\/deals\/([^/]+)/.exec(path) ?? [];
  return dealId === null || open === undefined || open === "new" || dealId === open;
}
