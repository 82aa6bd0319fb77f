import { describe, expect, it } from "vitest";
import { noShock } from "@/lib/pricing/shock";
import { blankShock, readShock, readSteps, shockFormOf, shockWords } from "@/lib/scenarios/form";

const typed = {
  ...blankShock,
  wider: "+50",
  shift: "25",
  correlation: "−10",
  recovery: "-5,5",
  sectors: [{ key: "a", sector: "Ships", wider: "100", recovery: "" }],
  defaults: "widest" as const,
  count: "2",
};

const shock = {
  scale: 1.5,
  shift: 0.0025,
  correlation: -0.1,
  recovery: -0.055,
  sectors: [{ sector: "Ships", scale: 2, recovery: 0 }],
  defaults: { kind: "widest" as const, count: 2 },
};

describe("a shock as typed", () => {
  it("is read with any sign and a comma or point; nothing typed moves nothing", () => {
    expect(readShock(typed)).toEqual({ ok: true, shock });
    expect(readShock(blankShock)).toEqual({ ok: true, shock: noShock });
  });

  it("comes back as it was read", () => {
    expect(readShock(shockFormOf(shock))).toEqual({ ok: true, shock });
    const named = { ...noShock, defaults: { kind: "names" as const, ids: ["A", "B"] } };
    expect(readShock(shockFormOf(named))).toEqual({ ok: true, shock: named });
  });

  it("tells every fault at once, with its field", () => {
    const reading = readShock({ ...typed, wider: "-150", recovery: "much", count: "1.5" });
    expect(!reading.ok && reading.problems.map(({ path }) => path)).toEqual(["wider", "recovery", "count"]);
  });

  it("is said in words", () => {
    expect(shockWords(shock)).toBe(
      "spreads +50 %; spreads +25 bp; correlation −10 points; recovery −5.5 points; Ships spreads +100 %; default of the 2 widest",
    );
    expect(shockWords(noShock)).toBe("nothing moves");
  });

  it("has axes of numbers parted by blanks or semicolons", () => {
    expect(readSteps("-50 0; +25,5  100", 100)).toEqual([-0.5, 0, 0.255, 1]);
    expect(readSteps("1 two", 100)).toBeNull();
  });
});
