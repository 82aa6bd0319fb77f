/** Where a deal stands: signed off as it is, signed off and changed since, under review, or none of these. */
export type Standing = "signed" | "changed" | "underReview" | "none";
