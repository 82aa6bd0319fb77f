/** One line on standard error for what a keeper of the server must know; never request bodies or secrets. */
export function logError(where: string, error: unknown): void {
  const reason = error instanceof Error ? (error.stack ?? error.message) : String(error);
  console.error(`${new Date().toISOString()} ${where}: ${reason}`);
}
