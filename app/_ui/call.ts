import type { Operations } from "@/lib/operations";
import type { Problem } from "@/lib/platform/errors";

/** What came of an operation: its output, or why not. `current` is the newer saved version after a conflict. */
export type Answer<Output> =
  | { readonly ok: true; readonly output: Output }
  | {
      readonly ok: false;
      readonly status: number;
      readonly problems: readonly Problem[];
      readonly current: unknown;
    };

/** The page's event that an operation was refused because the session has ended. */
export const SIGNED_OUT = "loadline signed out";

/** Runs an operation on the server by its name. Never throws: a lost connection is an answer too, with status 0. */
export async function call<Name extends keyof Operations>(
  name: Name,
  input: Operations[Name]["input"],
): Promise<Answer<Operations[Name]["output"]>> {
  try {
    const response = await fetch(`/api/v1/${name}`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify(input),
    });
    const body = await response.json();
    if (response.ok) return { ok: true, output: body };
    if (response.status === 401) window.dispatchEvent(new Event(SIGNED_OUT));
    return { ok: false, status: response.status, problems: body.errors ?? [], current: body.current };
  } catch {
    const message = "The server cannot be reached: nothing was lost here. Try again in a moment.";
    return { ok: false, status: 0, problems: [{ code: "offline", path: "", message }], current: undefined };
  }
}
