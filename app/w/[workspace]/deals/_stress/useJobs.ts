"use client";

import { useCallback, useEffect, useRef, useState } from "react";
import { call } from "@/app/_ui/call";
import type { Operations } from "@/lib/operations";
import { useLiveEvents } from "../../_live/liveContext";
import type { Work } from "./text";

export type OpenJob = Operations["jobs.open"]["output"];

/** A deal's grids on the server and the chosen one (else the newest), kept up by the events that tell of its progress. */
export function useJobs(workspaceId: string, dealId: string, work: Work, chosen: string) {
  const [jobs, setJobs] = useState(work.jobs);
  const [job, setJob] = useState<OpenJob | null>(null);
  const shownId = chosen || jobs[0]?.id || "";
  const asked = useRef(0);
  const fetchJob = useCallback(async () => {
    if (!shownId) return setJob(null);
    asked.current += 1;
    const turn = asked.current;
    const answer = await call("jobs.open", { workspaceId, jobId: shownId });
    if (turn === asked.current) setJob(answer.ok ? answer.output : null);
  }, [workspaceId, shownId]);
  const fetchList = useCallback(async () => {
    const answer = await call("jobs.list", { workspaceId, dealId });
    if (answer.ok) setJobs(answer.output.jobs);
  }, [workspaceId, dealId]);
  useEffect(() => setJobs(work.jobs), [work.jobs]);
  useEffect(() => {
    void fetchJob();
  }, [fetchJob]);
  const reload = useCallback(() => {
    void fetchList();
    void fetchJob();
  }, [fetchList, fetchJob]);
  useLiveEvents(({ kind, dealId: of, payload }) => {
    if (!kind.startsWith("job.") || of !== dealId) return;
    if (kind !== "job.progress") void fetchList();
    if ((payload as { jobId?: string }).jobId === shownId) void fetchJob();
  });
  return { jobs, job: job?.id === shownId ? job : null, reload };
}
