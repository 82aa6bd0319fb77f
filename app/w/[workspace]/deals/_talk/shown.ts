import type { Operations } from "@/lib/operations";

export type TalkShown = Operations["discussion.list"]["output"];
export type ThreadShown = TalkShown["threads"][number];
export type CommentShown = ThreadShown["comments"][number];

export interface MemberName {
  readonly userId: string;
  readonly name: string;
}
