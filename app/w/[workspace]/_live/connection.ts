/** What the server tells an open page; ids rise within a workspace. */
export interface LiveEvent {
  readonly id: string;
  readonly dealId: string | null;
  readonly kind: string;
  readonly payload: unknown;
}

/** Who looks at each deal: each person once. */
export type LookingAt = Readonly<Record<string, readonly { userId: string; name: string }[]>>;

export type LiveState = "open" | "lost" | "signedOut" | "outside";

export interface Connection {
  /** Tells the server which deal the page shows now. */
  show(dealId: string | null): void;
  end(): void;
}

const RETRY = 1_500;
/** The server speaks every fifteen seconds: after this silence the connection is dead, as after a sleep. */
const SILENCE = 40_000;
const LOOK_EVERY = 5_000;
/** A hidden page lets its stream go (a browser has few for one server) and catches up when it is seen again. */
const HIDDEN_FOR = 10_000;

/**
 * Keeps one stream of a workspace's events open: after a lost connection or a sleeping machine it comes back by itself and
 * goes on after the last event it had.
 */
export function keepConnected(
  workspaceId: string,
  shown: string | null,
  since: string,
  on: {
    event(event: LiveEvent): void;
    presence(lookingAt: LookingAt): void;
    state(state: LiveState): void;
  },
): Connection {
  const page = crypto.randomUUID?.() ?? String(Math.random()).slice(2);
  let dealId = shown;
  let last = since;
  let heardAt = Date.now();
  let hiddenAt: number | null = null;
  let source: EventSource | null = null;
  let timer: ReturnType<typeof setTimeout> | null = null;
  let isEnded = false;
  const place = () =>
    `workspace=${encodeURIComponent(workspaceId)}&page=${page}&deal=${encodeURIComponent(dealId ?? "")}`;

  const open = () => {
    timer = null;
    heardAt = Date.now();
    source = new EventSource(`/api/live?${place()}&since=${last}`);
    const heard = () => {
      heardAt = Date.now();
    };
    source.onopen = () => {
      heard();
      on.state("open");
    };
    source.addEventListener("beat", heard);
    source.addEventListener("presence", ({ data }) => {
      heard();
      on.presence(JSON.parse(data) as LookingAt);
    });
    source.onmessage = ({ data }) => {
      heard();
      const event = JSON.parse(data) as LiveEvent;
      last = event.id;
      on.event(event);
    };
    source.onerror = () => void again();
  };
  const close = () => {
    source?.close();
    source = null;
  };
  /** A refused stream has no reason that the page can read: it is asked for in the plain way. */
  const again = async () => {
    close();
    const answer = await fetch(`/api/live/may?${place()}`).catch(() => null);
    if (isEnded || source || timer) return;
    if (answer?.status === 401) on.state("signedOut");
    else if (answer?.status === 404) on.state("outside");
    else on.state("lost");
    timer = setTimeout(open, RETRY);
  };
  const look = () => {
    if (document.hidden) {
      hiddenAt ??= Date.now();
      if (source && Date.now() - hiddenAt > HIDDEN_FOR) close();
      return;
    }
    hiddenAt = null;
    const isSilent = Date.now() - heardAt > SILENCE;
    if (source && isSilent) close();
    if (!source && !timer) open();
  };
  const looking = setInterval(look, LOOK_EVERY);
  document.addEventListener("visibilitychange", look);
  window.addEventListener("online", look);
  open();
  return {
    show(next) {
      if (next === dealId) return;
      dealId = next;
      void fetch(`/api/live/here?${place()}`, { method: "POST" }).catch(() => undefined);
    },
    end() {
      isEnded = true;
      clearInterval(looking);
      document.removeEventListener("visibilitychange", look);
      window.removeEventListener("online", look);
      close();
      if (timer) clearTimeout(timer);
    },
  };
}
