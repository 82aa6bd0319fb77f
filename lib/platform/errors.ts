/** One thing that is wrong, in words a desk person can act on. `path` is dotted: `pool.1.recovery`. */
export interface Problem {
  readonly code: string;
  readonly path: string;
  readonly value?: unknown;
  readonly message: string;
}

/** Why an operation was refused; each kind has one HTTP status. */
export type RefusalKind =
  | "invalid"
  | "signedOut"
  | "forbidden"
  | "notFound"
  | "conflict"
  | "limited"
  | "unavailable";

const statusOf: Record<RefusalKind, number> = {
  invalid: 422,
  signedOut: 401,
  forbidden: 403,
  notFound: 404,
  conflict: 409,
  limited: 429,
  unavailable: 503,
};

/**
 * The only error a command or query throws on purpose. It carries all problems at once; a `conflict`
 * also carries the newer saved version, so that the screen can show both.
 */
export class Refusal extends Error {
  readonly kind: RefusalKind;
  readonly problems: readonly Problem[];
  readonly current: unknown;

  constructor(kind: RefusalKind, problems: readonly Problem[], current?: unknown) {
    super(problems.map((problem) => problem.message).join(" ") || kind);
    this.name = "Refusal";
    this.kind = kind;
    this.problems = problems;
    this.current = current;
  }

  /** The HTTP status that tells the same story. */
  get status(): number {
    return statusOf[this.kind];
  }
}

/** A refusal with a single problem and no field. */
export function refuse(kind: RefusalKind, code: string, message: string, path = ""): Refusal {
  return new Refusal(kind, [{ code, path, message }]);
}

/** What another workspace's things, and things that never were, look like. */
export function notFound(what: string): Refusal {
  return refuse("notFound", "notFound", `There is no such ${what} here.`);
}

/** Someone saved meanwhile; `current` is what is stored now. */
export function staleVersion(what: string, current: unknown): Refusal {
  return new Refusal(
    "conflict",
    [
      {
        code: "staleVersion",
        path: "version",
        message: `Someone saved a newer version of this ${what} meanwhile.`,
      },
    ],
    current,
  );
}
