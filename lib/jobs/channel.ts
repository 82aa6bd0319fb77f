/** Told when work is waiting; the payload is the job's id. */
export const JOBS_CHANNEL = "loadline_jobs";
