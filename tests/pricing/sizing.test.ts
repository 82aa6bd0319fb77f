import { describe, expect, it } from "vitest";
import { price } from "@/lib/pricing/price";
import type { PricingRequest } from "@/lib/pricing/request";
import { type SizedClass, type SizingTarget, sizeClasses } from "@/lib/pricing/sizing";

const request: PricingRequest = {
  format: 1,
  currency: "EUR",
  schedule: { kind: "even", years: 5, perYear: 4 },
  discount: { kind: "flat", rate: 0.02 },
  pool: Array.from({ length: 40 }, (_, i) => ({
    id: `N${i}`,
    notional: 1_000_000 + 10_000 * (i % 3),
    recovery: 0.4,
    credit: { kind: "spread" as const, nodes: [{ years: 5, spread: 0.008 + 0.0005 * (i % 7) }] },
  })),
  correlation: { kind: "flat", rho: 0.25 },
  tranches: [],
};
const step = 1e-4;

function sized(targets: readonly SizingTarget[], of: PricingRequest = request): readonly SizedClass[] {
  const answer = sizeClasses({ request: of, top: 1, targets, step });
  if (!answer.ok) throw new Error(answer.problems.map(({ message }) => message).join(" "));
  return answer.classes;
}

/** The report's figures of a class from `attachment` to `detachment`. */
function figures(attachment: number, detachment: number, of: PricingRequest = request) {
  const outcome = price({ ...of, tranches: [{ id: "T", attachment, detachment }] });
  if (!outcome.ok) throw new Error("refused");
  return outcome.report.tranches[0]!;
}

const targets: SizingTarget[] = [
  { id: "A", limits: { expectedLoss: 0.001 } },
  { id: "B", limits: { hitProbability: 0.08 } },
  { id: "C", limits: { parSpread: 0.05 } },
];

describe("boundaries from targets", () => {
  it("let each class reach as low as its limit allows: one step lower breaks it in the priced report too", () => {
    const classes = sized(targets);
    expect(classes.map(({ id, ok }) => [id, ok])).toEqual([
      ["A", true],
      ["B", true],
      ["C", true],
    ]);
    for (const [i, found] of classes.entries()) {
      if (!found.ok) throw new Error("not placed");
      const [[kind, most]] = Object.entries(targets[i]!.limits) as [["expectedLoss", number]];
      expect(found.binding).toBe(kind);
      expect(figures(found.attachment, found.detachment)[kind]).toBeLessThanOrEqual(most + 1e-9);
      expect(figures(found.attachment - step, found.detachment)[kind]).toBeGreaterThan(most - 1e-9);
      expect(found.figures[kind]).toBeCloseTo(figures(found.attachment, found.detachment)[kind]!, 7);
    }
  });

  it("touch, and are whole multiples of the step", () => {
    const classes = sized(targets);
    for (const [i, { detachment }] of classes.entries()) {
      const above = classes[i - 1];
      expect(detachment).toBe(above?.ok ? above.attachment : 1);
      expect(Math.abs(detachment / step - Math.round(detachment / step))).toBeLessThan(1e-6);
    }
  });

  it("obey every limit of a class and name the one that binds", () => {
    const both = { expectedLoss: 0.001, hitProbability: 0.5 };
    const [one] = sized([{ id: "A", limits: both }]);
    const [other] = sized([{ id: "A", limits: { ...both, hitProbability: 0.001 } }]);
    expect(one?.ok && one.binding).toBe("expectedLoss");
    expect(other?.ok && other.binding).toBe("hitProbability");
    expect(other?.ok && one?.ok && other.attachment > one.attachment).toBe(true);
  });

  it("say what is impossible: a limit below the least that the place allows, nothing left, no limit", () => {
    const senior = { id: "A", limits: { hitProbability: 0.05 } };
    // Whatever lies below the first class is hit at least as often as that class.
    const [, tight] = sized([senior, { id: "B", limits: { hitProbability: 0.01 } }]);
    expect(tight).toMatchObject({ ok: false, reason: "tooTight", limit: "hitProbability" });
    expect(tight?.ok === false && tight.least! > 0.04).toBe(true);
    const [all, none] = sized([{ id: "A", limits: { expectedLoss: 1 } }, senior]);
    expect(all).toMatchObject({ ok: true, attachment: 0, binding: null });
    expect(none).toMatchObject({ ok: false, reason: "noRoom" });
    expect(sized([{ id: "A", limits: {} }])[0]).toMatchObject({ ok: false, reason: "noLimit" });
  });

  it("hold under a base curve too, where each strike has its own correlation", () => {
    const correlation = {
      kind: "base" as const,
      nodes: [
        { strike: 0.03, rho: 0.2 },
        { strike: 0.1, rho: 0.35 },
        { strike: 0.3, rho: 0.5 },
      ],
      interpolation: "linear" as const,
      beyond: "flat" as const,
      mapping: "none" as const,
    };
    const of = { ...request, correlation };
    const [found] = sized([{ id: "A", limits: { expectedLoss: 0.002 } }], of);
    if (!found?.ok) throw new Error("not placed");
    expect(figures(found.attachment, 1, of).expectedLoss).toBeLessThanOrEqual(0.002 + 1e-9);
    expect(figures(found.attachment - step, 1, of).expectedLoss).toBeGreaterThan(0.002);
  });

  // O. Vasicek, "The distribution of loan portfolio value", Risk, December 2002: the loss that a large pool exceeds with
  // probability α is (1 − R) Φ((Φ⁻¹(p) + √ρ Φ⁻¹(1 − α)) / √(1 − ρ)); the values are from Python's statistics.NormalDist.
  it.each([
    [0.01, 0.2, 0.01, 0.0451504737],
    [0.01, 0.2, 0.001, 0.0873151597],
    [0.02, 0.12, 0.001, 0.0883694981],
  ])("a large pool's hit probability: p %f, ρ %f, α %f", (probability, rho, alpha, boundary) => {
    const of: PricingRequest = {
      ...request,
      schedule: { kind: "even", years: 1, perYear: 4 },
      pool: [{ id: "N", notional: 1, recovery: 0.4, credit: { kind: "yearly", probability } }],
      correlation: { kind: "flat", rho },
      law: { kind: "largePool" },
    };
    const answer = sizeClasses({
      request: of,
      top: 1,
      targets: [{ id: "A", limits: { hitProbability: alpha } }],
      step: 1e-6,
    });
    const [found] = answer.ok ? answer.classes : [];
    expect(found?.ok && found.attachment).toBeGreaterThanOrEqual(boundary - 1e-7);
    expect(found?.ok && found.attachment).toBeLessThanOrEqual(boundary + 1.1e-6);
  });
});
