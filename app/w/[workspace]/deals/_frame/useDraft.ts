"use client";

import { useCallback, useMemo, useState } from "react";
import { useKept } from "@/app/_ui/useKept";
import type { DealForm } from "@/lib/deals/form";

const MOST_STEPS = 200;

/** What someone typed over a deal: the form, the version it was begun on and that version's own form. */
export interface KeptDeal {
  readonly form: DealForm;
  readonly version: number;
  readonly base: DealForm;
}

interface Steps {
  readonly past: readonly (KeptDeal | null)[];
  readonly future: readonly (KeptDeal | null)[];
  readonly gesture: string | null;
}

const noSteps: Steps = { past: [], future: [], gesture: null };

/**
 * The unsaved text of a deal, kept in this browser, with its undo and redo. Successive changes of one gesture (the typing
 * in one field, one drag) are one step.
 */
export function useDraft(key: string, saved: DealForm, version: number) {
  const [kept, setKept] = useKept<KeptDeal>(key);
  const [steps, setSteps] = useState<Steps>(noSteps);
  const step = useCallback(
    (next: KeptDeal | null, gesture: string | null) => {
      setSteps((before) =>
        gesture !== null && before.gesture === gesture
          ? { ...before, future: [] }
          : { past: [...before.past, kept].slice(-MOST_STEPS), future: [], gesture },
      );
      setKept(next);
    },
    [kept, setKept],
  );
  const form = useMemo(() => (kept ? { ...saved, ...kept.form } : saved), [kept, saved]);
  return {
    kept,
    form,
    /** Lays new text over the form; `gesture` names what it belongs to. */
    change(part: Partial<DealForm>, gesture: string | null = null) {
      const next = { ...form, ...part };
      const base = kept?.base ?? saved;
      const isBack = JSON.stringify(next) === JSON.stringify(saved) && (kept?.version ?? version) === version;
      step(isBack ? null : { form: next, version: kept?.version ?? version, base }, gesture);
    },
    /** Takes a form as typed over another version: what a conflict was resolved to. */
    rebase(next: DealForm, onVersion: number) {
      step(
        JSON.stringify(next) === JSON.stringify(saved)
          ? null
          : { form: next, version: onVersion, base: saved },
        null,
      );
    },
    discard() {
      step(null, null);
    },
    /** The text is saved: nothing is left to undo. */
    settle() {
      setSteps(noSteps);
      setKept(null);
    },
    canUndo: steps.past.length > 0,
    canRedo: steps.future.length > 0,
    undo() {
      const last = steps.past.at(-1);
      if (last === undefined) return;
      setSteps({ past: steps.past.slice(0, -1), future: [kept, ...steps.future], gesture: null });
      setKept(last);
    },
    redo() {
      const [next] = steps.future;
      if (next === undefined) return;
      setSteps({ past: [...steps.past, kept], future: steps.future.slice(1), gesture: null });
      setKept(next);
    },
  };
}

export type Draft = ReturnType<typeof useDraft>;
