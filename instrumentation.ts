/** Runs once when the server starts, not during a build: background work begins. */
export async function register(): Promise<void> {
  if (process.env.NEXT_RUNTIME !== "nodejs") return;
  const { startJobs } = await import("./lib/jobs/start");
  await startJobs();
  const { startNoticeMail } = await import("./lib/notices/startMail");
  await startNoticeMail();
}
