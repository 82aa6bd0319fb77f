import { describe, expect, it } from "vitest";
import { mentionsIn, readable } from "@/app/w/[workspace]/deals/_talk/mentions";

const members = [
  { userId: "1", name: "Ann" },
  { userId: "2", name: "Ann Lee" },
  { userId: "3", name: "Bo (desk)" },
];

describe("TALK: naming people", () => {
  it("takes the longest name that stands there whole, never a part of a longer word, nor one in code", () => {
    expect(mentionsIn("@Ann Lee and @Bo (desk)", members)).toEqual(["2", "3"]);
    expect(mentionsIn("@Ann, look", members)).toEqual(["1"]);
    expect(mentionsIn("@Annabel, `@Ann`, ```\n@Ann\n```", members)).toEqual([]);
    expect(mentionsIn("@anyone", [])).toEqual([]);
  });

  it("leaves code as typed, makes addresses links and keeps line breaks", () => {
    expect(readable("@Ann see https://a.example/x\n`@Ann https://a.example`", members)).toBe(
      "**@Ann** see <https://a.example/x>  \n`@Ann https://a.example`",
    );
  });
});
