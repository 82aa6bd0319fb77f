"use client";

import { useCallback, useEffect, useState } from "react";
import { EngineLine } from "@/lib/compute/browserEngine";
import type { TaskInput, TaskKind, TaskOutput } from "@/lib/compute/tasks";

const MOST_LINES = 4;
const MOST_KEPT = 6;

/** Work in pieces as far as it has come; `outputs` has a place for every piece. */
export interface Pieces<Output> {
  readonly outputs: readonly (Output | undefined)[];
  readonly done: number;
  readonly isBusy: boolean;
  readonly isStopped: boolean;
  /** Why the engine itself gave up; refusals are outputs. */
  readonly problem: string | null;
  /** Ends the work where it stands; what is there stays. */
  stop(): void;
  goOn(): void;
}

interface State {
  readonly key: string | null;
  readonly outputs: readonly unknown[];
  readonly isBusy: boolean;
  readonly problem: string | null;
}

/** What was worked out lately, whole or in part, by key. */
const kept = new Map<string, readonly unknown[]>();
const nothing: State = { key: null, outputs: [], isBusy: false, problem: null };

/**
 * Works pieces out in this browser, several at a time, and shows them as they come; what is there is remembered under `key`
 * while the page lives. A null key works nothing out; a new one drops what is under way.
 */
export function usePieces<Kind extends TaskKind>(
  kind: Kind,
  key: string | null,
  inputs: readonly TaskInput<Kind>[],
): Pieces<TaskOutput<Kind>> {
  const [state, setState] = useState<State>(nothing);
  const [stopped, setStopped] = useState<string | null>(null);
  // biome-ignore lint/correctness/useExhaustiveDependencies: the key says what the inputs are
  useEffect(() => {
    if (key === null) return;
    const outputs = [...(kept.get(key) ?? new Array<unknown>(inputs.length).fill(undefined))];
    const waiting = inputs.flatMap((input, i) => (outputs[i] === undefined ? [{ input, i }] : []));
    const isOver = waiting.length === 0 || stopped === key;
    setState({ key, outputs, isBusy: !isOver, problem: null });
    if (isOver) return;
    const lines = Array.from({ length: linesFor(waiting.length) }, () => new EngineLine());
    let left = waiting.length;
    let isWanted = true;
    const end = () => {
      isWanted = false;
      for (const line of lines) line.close();
    };
    const work = async (line: EngineLine) => {
      for (let next = waiting.shift(); next && isWanted; next = waiting.shift()) {
        const output = await line.run(kind, next.input);
        if (!isWanted || output === null) return;
        outputs[next.i] = output;
        left -= 1;
        keep(key, [...outputs]);
        setState({ key, outputs: [...outputs], isBusy: left > 0, problem: null });
      }
      line.close();
    };
    for (const line of lines)
      work(line).catch(({ message }: Error) => {
        if (!isWanted) return;
        end();
        setState((before) => ({ ...before, isBusy: false, problem: message }));
      });
    return end;
  }, [kind, key, stopped]);
  const current = state.key === key ? state : nothing;
  const outputs = current.outputs as readonly (TaskOutput<Kind> | undefined)[];
  return {
    outputs,
    done: outputs.filter((output) => output !== undefined).length,
    isBusy: current.isBusy,
    isStopped: key !== null && stopped === key,
    problem: current.problem,
    stop: useCallback(() => setStopped(key), [key]),
    goOn: useCallback(() => setStopped(null), []),
  };
}

function linesFor(pieces: number): number {
  const cores = navigator.hardwareConcurrency || 2;
  return Math.max(1, Math.min(MOST_LINES, cores - 1, pieces));
}

function keep(key: string, outputs: readonly unknown[]): void {
  kept.delete(key);
  kept.set(key, outputs);
  for (const oldest of [...kept.keys()].slice(0, Math.max(0, kept.size - MOST_KEPT))) kept.delete(oldest);
}
