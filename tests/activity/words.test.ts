import { describe, expect, test } from "vitest";
import { activityWords, fieldChanges } from "@/lib/activity/words";

describe("what an entry of the activity says", () => {
  test("its kind in words, and one without words of its own by its parts", () => {
    expect(activityWords("deal.saved")).toBe("saved a deal");
    expect(activityWords("scenario.wholeMoved")).toBe("scenario: whole moved");
  });

  test("each field that changed by its path, rows by their id and not their place", () => {
    const before = {
      name: "D",
      classes: [
        { id: "K", attachment: 0 },
        { id: "H", attachment: 0.03 },
      ],
    };
    const after = {
      name: "D",
      classes: [
        { id: "H", attachment: 0.04 },
        { id: "K", attachment: 0 },
        { id: "N", attachment: 0.1 },
      ],
    };
    expect(fieldChanges(before, after)).toEqual([
      { path: "classes.H.attachment", before: 0.03, after: 0.04 },
      { path: "classes.N", before: null, after: { id: "N", attachment: 0.1 } },
    ]);
    expect(fieldChanges(before, before)).toEqual([]);
  });
});
