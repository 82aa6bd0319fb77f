"use client";

import { Button, Modal } from "@mantine/core";
import Link from "next/link";
import { createContext, type ReactNode, useContext, useState } from "react";
import { call } from "@/app/_ui/call";
import { roomAddress } from "../_frame/rooms";
import { Composer } from "./Composer";
import styles from "./pointing.module.css";
import type { TalkShown } from "./shown";

interface Pointed {
  readonly path: string;
  readonly label: string;
}

interface PointingAtHand {
  readonly isOn: boolean;
  readonly address: string;
  /** Open threads by the path of their figure. */
  readonly counts: ReadonlyMap<string, number>;
  point(figure: Pointed): void;
}

const PointingContext = createContext<PointingAtHand | null>(null);

/** Lets a reader point at a figure of a run and start a thread on it; marks figures that have open threads. */
export function Pointing({
  workspaceId,
  dealId,
  runId,
  talk,
  children,
}: {
  workspaceId: string;
  dealId: string;
  runId: string;
  talk: TalkShown;
  children: ReactNode;
}) {
  const [isOn, setOn] = useState(false);
  const [figure, setFigure] = useState<Pointed | null>(null);
  const counts = new Map<string, number>();
  for (const { pin, isResolved } of talk.threads)
    if (pin.kind === "figure" && !isResolved) counts.set(pin.path, (counts.get(pin.path) ?? 0) + 1);
  const address = roomAddress(workspaceId, dealId, "talk");
  return (
    <PointingContext.Provider value={{ isOn, address, counts, point: setFigure }}>
      {talk.may.comment && (
        <Button
          size="compact-sm"
          w="fit-content"
          variant={isOn ? "filled" : "default"}
          className="screenOnly"
          aria-pressed={isOn}
          onClick={() => setOn(!isOn)}
        >
          {isOn ? "Choose a figure to talk about; click here to stop" : "Point at a figure"}
        </Button>
      )}
      {children}
      <Modal
        opened={figure !== null}
        onClose={() => setFigure(null)}
        title={`Thread on ${figure?.label ?? ""}`}
      >
        {figure && (
          <Composer
            draft={`pin ${runId} ${figure.path}`}
            label="What about this figure"
            act="Post"
            members={talk.members}
            send={async (body, mentions) => {
              const anchor = { kind: "figure" as const, runId, ...figure };
              const answer = await call("discussion.start", { workspaceId, dealId, body, mentions, anchor });
              if (answer.ok) {
                setFigure(null);
                setOn(false);
              }
              return answer;
            }}
          />
        )}
      </Modal>
    </PointingContext.Provider>
  );
}

/** A figure that can be pointed at; outside a pointing page it is just the figure. */
export function Pointable({ path, label, children }: Pointed & { children: ReactNode }) {
  const pointing = useContext(PointingContext);
  if (!pointing) return children;
  const count = pointing.counts.get(path) ?? 0;
  return (
    <>
      {pointing.isOn ? (
        <button
          type="button"
          className={styles.target}
          aria-label={`Talk about ${label}`}
          onClick={() => pointing.point({ path, label })}
        >
          {children}
        </button>
      ) : (
        children
      )}
      {count > 0 && (
        <Link
          href={`${pointing.address}?find=${encodeURIComponent(label)}`}
          className={styles.mark}
          aria-label={`${count} open ${count === 1 ? "thread" : "threads"} on ${label}`}
        >
          {count}
        </Link>
      )}
    </>
  );
}
