"use client";

import { Modal } from "@mantine/core";
import Link from "next/link";
import { createContext, type ReactNode, useContext, useMemo, useState } from "react";
import { call } from "@/app/_ui/call";
import { type Anchor, markKey } from "@/lib/discussion/anchor";
import type { Operations } from "@/lib/operations";
import { roomAddress } from "../_frame/rooms";
import { Composer } from "./Composer";
import styles from "./pins.module.css";

/** What a thread can be pinned to beside the deal itself. */
export type PinTo = Exclude<Anchor, { kind: "deal" }>;

interface PinsAtHand {
  readonly address: string;
  readonly mayComment: boolean;
  count(pin: PinTo): number;
  start(pin: PinTo): void;
}

const PinsContext = createContext<PinsAtHand | null>(null);

/** What the marks of a deal's rooms stand on; null where there is no deal to talk about. */
export function usePins(): PinsAtHand | null {
  return useContext(PinsContext);
}

/** Lets the rooms of a deal mark what has open threads, and start one on what they show. */
export function Pins({
  workspaceId,
  dealId,
  marks,
  children,
}: {
  workspaceId: string;
  dealId: string;
  marks: Operations["discussion.marks"]["output"];
  children: ReactNode;
}) {
  const [pin, setPin] = useState<PinTo | null>(null);
  const { open, may, members } = marks;
  const atHand = useMemo(() => {
    const counts = new Map(open.map(({ key, count }) => [key, count]));
    return {
      address: roomAddress(workspaceId, dealId, "talk"),
      mayComment: may.comment,
      count: (at: PinTo) => counts.get(markKey(at) ?? "") ?? 0,
      start: setPin,
    };
  }, [workspaceId, dealId, open, may.comment]);
  return (
    <PinsContext.Provider value={atHand}>
      {children}
      <Modal opened={pin !== null} onClose={() => setPin(null)} title={`Thread on ${pin?.label ?? ""}`}>
        {pin && (
          <Composer
            draft={`pin ${dealId} ${markKey(pin)}`}
            label={`What about ${pin.label}`}
            act="Post"
            members={members}
            send={async (body, mentions) => {
              const input = { workspaceId, dealId, body, mentions, anchor: pin };
              const answer = await call("discussion.start", input);
              if (answer.ok) setPin(null);
              return answer;
            }}
          />
        )}
      </Modal>
    </PinsContext.Provider>
  );
}

/** The mark beside a class, name, quote or figure: how many open threads it has, or the way to start one. */
export function PinMark({ pin, isQuiet = false }: { pin: PinTo; isQuiet?: boolean }) {
  const pins = usePins();
  if (!pins) return null;
  const count = pins.count(pin);
  if (count > 0)
    return (
      <Link
        href={`${pins.address}?find=${encodeURIComponent(pin.label)}`}
        className={styles.mark}
        aria-label={`${count} open ${count === 1 ? "thread" : "threads"} on ${pin.label}`}
      >
        {count}
      </Link>
    );
  if (!pins.mayComment || isQuiet) return null;
  return (
    <button
      type="button"
      className={styles.start}
      title={`Talk about ${pin.label}`}
      aria-label={`Talk about ${pin.label}`}
      onClick={() => pins.start(pin)}
    >
      +
    </button>
  );
}
