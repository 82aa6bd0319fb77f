/** Where to go after signing in: a path of our own, never another site. */
export function safeNext(next: string | undefined): string {
  return next && /^\/(?![/\\])/.test(next) ? next : "/";
}
