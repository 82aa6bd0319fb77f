import type { Membership } from "../platform/accounts/actor";
import { mayEdit, mayManage, mayWork } from "../workspaces/policy";

/** What of a review decides who may do what. */
export interface ReviewSubject {
  readonly state: string;
  readonly askedById: string;
  readonly reviewers: readonly string[];
  /** Ids of those who have answered. */
  readonly answered: readonly string[];
}

export function mayAsk(member: Pick<Membership, "role">): boolean {
  return mayEdit(member);
}

/** A named reviewer who may work here, once, and never on one's own request. */
export function mayAnswer(member: Membership, review: ReviewSubject): boolean {
  return (
    review.state === "open" &&
    mayWork(member) &&
    review.askedById !== member.userId &&
    review.reviewers.includes(member.userId) &&
    !review.answered.includes(member.userId)
  );
}

/** Who asked, or an owner, while it is open. */
export function mayWithdraw(member: Membership, review: ReviewSubject): boolean {
  return review.state === "open" && (review.askedById === member.userId || mayManage(member));
}
