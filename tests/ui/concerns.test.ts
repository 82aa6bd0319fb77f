import { describe, expect, it } from "vitest";
import { concerns } from "@/app/w/[workspace]/_live/concerns";

const deal = "/w/1/deals/a";

describe("LIVE: a page is asked for again only for what it shows", () => {
  it.each([
    ["comment.posted", "a", `${deal}/talk`, true],
    ["comment.posted", "a", `${deal}/runs/7`, true],
    ["comment.posted", "a", `${deal}/stress`, false],
    ["comment.posted", "b", `${deal}/talk`, false],
    ["deal.saved", "a", `${deal}/stress`, true],
    ["deal.saved", "b", deal, false],
    ["run.priced", "b", "/w/1/deals", true],
    ["pool.saved", null, deal, true],
    ["pool.saved", null, "/w/1/markets", false],
    ["comment.posted", "a", "/w/1/pools/9", false],
    ["comment.posted", "a", "/w/1/activity", true],
    ["member.roleChanged", null, "/w/1/pools/9", true],
    ["notice.new", null, "/w/1/pools/9", true],
    ["job.done", "a", `${deal}/stress`, false],
    ["invitation.made", null, "/w/1/people", true],
  ])("%s of %s on %s: %s", (kind, dealId, path, expected) => {
    expect(concerns({ kind, dealId }, path)).toBe(expected);
  });
});
