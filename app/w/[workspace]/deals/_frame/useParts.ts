"use client";

import { useEffect, useState } from "react";
import { call } from "@/app/_ui/call";
import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

export type Parts = Operations["deals.parts"]["output"];

/** The saved pool and market that a deal's text names; null while they are fetched. `stamp` changes when they may have changed. */
export function useParts(workspaceId: string, poolId: string, marketId: string, stamp: string) {
  const [fetched, setFetched] = useState<{ key: string; parts: Parts } | null>(null);
  const [problems, setProblems] = useState<readonly Problem[]>([]);
  const key = `${poolId} ${marketId} ${stamp}`;
  useEffect(() => {
    if (!poolId || !marketId) return;
    let isWanted = true;
    call("deals.parts", { workspaceId, poolId, marketId }).then((answer) => {
      if (!isWanted) return;
      if (answer.ok) setFetched({ key, parts: answer.output });
      setProblems(answer.ok ? [] : answer.problems);
    });
    return () => {
      isWanted = false;
    };
  }, [workspaceId, poolId, marketId, key]);
  const isOfThese = fetched?.key.startsWith(`${poolId} ${marketId} `) ?? false;
  return { parts: isOfThese ? (fetched?.parts ?? null) : null, problems };
}
