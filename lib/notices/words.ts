import type { NoticeOf } from "./notify";

/** What is said of a notice: who did it, and in which deal. */
export interface NoticeTold {
  readonly kind: NoticeOf["kind"];
  readonly by: string;
  readonly deal: string | null;
  readonly payload: NoticeOf["payload"];
}

/** A notice as one sentence. */
export function noticeWords({ kind, by, deal, payload }: NoticeTold): string {
  const place = deal ?? "a deal that is gone";
  switch (kind) {
    case "mention":
      return `${by} named you in ${place}`;
    case "reply":
      return `${by} wrote in a thread of yours in ${place}`;
    case "review.asked":
      return `${by} asks you to review run ${payload.run} of ${place}`;
    case "review.answered":
      return `${by} ${payload.answer === "signed" ? "signed off" : "sent back"} run ${payload.run} of ${place}`;
    case "deal.changed":
      return payload.run
        ? `${by} priced run ${payload.run} of ${place}`
        : `${by} saved version ${payload.version} of ${place}`;
  }
}

/** Where a notice leads, as a path of the app. */
export function noticePlace(
  workspaceId: string,
  dealId: string,
  { kind, payload }: Pick<NoticeTold, "kind" | "payload">,
): string {
  const home = `/w/${workspaceId}/deals/${dealId}`;
  if (kind === "mention" || kind === "reply") return `${home}/talk?threads=all#comment-${payload.commentId}`;
  if (kind === "review.asked" || kind === "review.answered") return `${home}/sign-off`;
  return payload.runId ? `${home}/runs/${payload.runId}` : home;
}
