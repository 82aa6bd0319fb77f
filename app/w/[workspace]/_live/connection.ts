/** What the server tells an open page; ids rise within a workspace. */
export interface LiveEvent {
  readonly id: string;
  readonly dealId: string | null;
  readonly kind: string;
  readonly payload: unknown;
}

export type LiveState = "open" | "lost" | "signedOut" | "outside";

const RETRY = 1_500;

/**
 * Keeps one stream of a workspace's events open: after a lost connection or a sleeping machine it comes back by itself and
 * goes on after the last event it had. @returns the way to end it.
 */
export function keepConnected(
  workspaceId: string,
  onEvent: (event: LiveEvent) => void,
  onState: (state: LiveState) => void,
): () => void {
  let last: string | null = null;
  let source: EventSource | null = null;
  let timer: ReturnType<typeof setTimeout> | null = null;
  let isEnded = false;

  const open = () => {
    const since = last === null ? "" : `&since=${last}`;
    source = new EventSource(`/api/live?workspace=${encodeURIComponent(workspaceId)}${since}`);
    source.onopen = () => onState("open");
    source.onmessage = ({ data }) => {
      const event = JSON.parse(data) as LiveEvent;
      last = event.id;
      onEvent(event);
    };
    source.onerror = () => {
      source?.close();
      source = null;
      void again();
    };
  };
  /** A refused stream has no reason that the page can read: it is asked for in the plain way. */
  const again = async () => {
    const answer = await fetch(`/api/live/may?workspace=${encodeURIComponent(workspaceId)}`).catch(
      () => null,
    );
    if (isEnded) return;
    if (answer?.status === 401) onState("signedOut");
    else if (answer?.status === 404) onState("outside");
    else onState("lost");
    timer = setTimeout(open, RETRY);
  };
  open();
  return () => {
    isEnded = true;
    source?.close();
    if (timer) clearTimeout(timer);
  };
}
