"use client";

import { Button } from "@mantine/core";
import { createContext, type ReactNode, useContext, useState } from "react";
import { PinMark, usePins } from "./Pins";
import styles from "./pins.module.css";

const PointingContext = createContext<{ readonly isOn: boolean; readonly runId: string } | null>(null);

/** Lets a reader point at any figure of a run and start a thread on it. */
export function Pointing({ runId, children }: { runId: string; children: ReactNode }) {
  const [isOn, setOn] = useState(false);
  const pins = usePins();
  return (
    <PointingContext.Provider value={{ isOn, runId }}>
      {pins?.mayComment && (
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
    </PointingContext.Provider>
  );
}

/** A figure that can be pointed at, marked when it has open threads; outside a run it is just the figure. */
export function Pointable({ path, label, children }: { path: string; label: string; children: ReactNode }) {
  const pointing = useContext(PointingContext);
  const pins = usePins();
  if (!pointing || !pins) return children;
  const pin = { kind: "figure" as const, runId: pointing.runId, path, label };
  return (
    <>
      {pointing.isOn ? (
        <button
          type="button"
          className={styles.target}
          aria-label={`Talk about ${label}`}
          onClick={() => pins.start(pin)}
        >
          {children}
        </button>
      ) : (
        children
      )}
      <PinMark pin={pin} isQuiet />
    </>
  );
}
