import { spawnSync } from "node:child_process";
import { mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import fc from "fast-check";
import { describe, expect, expectTypeOf, it } from "vitest";
import { canonicalJson, requestHash } from "@/lib/pricing/canonical";
import { price } from "@/lib/pricing/price";
import type { PricingReport } from "@/lib/pricing/report";
import type { PricingRequest } from "@/lib/pricing/request";

const sound: PricingRequest = {
  format: 1,
  schedule: { kind: "even", years: 1, perYear: 2 },
  discount: { kind: "flat", rate: 0.02 },
  pool: [
    { id: "A", notional: 1, recovery: 0.4, credit: { kind: "hazard", rate: 0.02 } },
    { id: "B", notional: 1, recovery: 0.4, credit: { kind: "spread", nodes: [{ years: 1, spread: 0.01 }] } },
  ],
  correlation: { kind: "flat", rho: 0.3 },
  tranches: [{ id: "T", attachment: 0, detachment: 0.3 }],
};

describe("REFUSE: every problem at once, by path, with the row's id, the field and the value", () => {
  it("names each of several problems", () => {
    const outcome = price({
      ...sound,
      pool: [
        { ...sound.pool[0], recovery: 1 },
        { ...sound.pool[1], id: "A", notional: 0 },
      ],
      correlation: { kind: "sector", within: 0.2, between: 0.3 },
      tranches: [{ id: "T", attachment: 0.3, detachment: 0.3 }],
      extra: true,
    });
    expect(outcome.ok).toBe(false);
    if (outcome.ok) return;
    const paths = outcome.problems.map((problem) => problem.path);
    for (const path of [
      "pool.0.recovery",
      "pool.1.id",
      "pool.1.notional",
      "correlation.between",
      "tranches.0",
      "extra",
    ]) {
      expect(paths).toContain(path);
    }
    expect(outcome.problems.find((problem) => problem.path === "pool.0.recovery")?.message).toMatch(
      /A.*recovery.*1/i,
    );
  });

  it("a spread curve without a hazard names its tenor", () => {
    const nodes = [
      { years: 0.5, spread: 0.2 },
      { years: 1, spread: 0.001 },
    ];
    const outcome = price({ ...sound, pool: [{ ...sound.pool[0], credit: { kind: "spread", nodes } }] });
    expect(!outcome.ok && outcome.problems[0]).toMatchObject({
      code: "noHazard",
      path: "pool.0.credit.nodes.1",
    });
  });
});

const anything = fc.anything({ maxDepth: 4, withBigInt: false });

describe("FUZZ: never an exception, never a number that is not finite", () => {
  const isFiniteThroughout = (value: unknown): boolean =>
    typeof value === "number"
      ? Number.isFinite(value)
      : typeof value !== "object" || value === null || Object.values(value).every(isFiniteThroughout);

  it("on raw values of any shape", () => {
    fc.assert(
      fc.property(anything, (raw) => !price(raw).ok),
      { numRuns: 2_000 },
    );
  });

  it("on a sound request with one part replaced by anything", () => {
    const keys = fc.constantFrom(...(Object.keys(sound) as (keyof PricingRequest)[]));
    fc.assert(
      fc.property(
        keys,
        fc.oneof(anything, fc.double(), fc.constantFrom(-1, 0, 1e-300, 1e300)),
        (key, part) => {
          const outcome = price({ ...sound, [key]: part });
          return !outcome.ok || isFiniteThroughout(outcome.report);
        },
      ),
      { numRuns: 2_000 },
    );
  });

  it("on extreme but well-formed credits, correlations and strikes", () => {
    const credit = fc.oneof(
      fc.record({ kind: fc.constant("hazard"), rate: fc.double({ min: 0, max: 1_000, noNaN: true }) }),
      fc.record({ kind: fc.constant("yearly"), probability: fc.double({ min: 0, max: 1, noNaN: true }) }),
      fc.constant({ kind: "defaulted" }),
    );
    const unit = fc.double({ min: 0, max: 1, noNaN: true });
    const name = fc.record({
      notional: fc.double({ min: 1e-9, max: 1e12, noNaN: true }),
      recovery: fc.double({ min: 0, max: 0.999, noNaN: true }),
      credit,
    });
    fc.assert(
      fc.property(
        fc.array(name, { minLength: 1, maxLength: 4 }),
        unit,
        unit,
        unit,
        (names, rho, one, other) => {
          const outcome = price({
            ...sound,
            pool: names.map((row, i) => ({ ...row, id: `N${i}` })),
            correlation: { kind: "flat", rho },
            tranches: [
              {
                id: "T",
                attachment: Math.min(one, other),
                detachment: Math.max(one, other),
                running: 0.01,
                upfront: 0,
              },
            ],
          });
          return !outcome.ok || isFiniteThroughout(outcome.report);
        },
      ),
      { numRuns: 300 },
    );
  });
});

describe("CANONICAL: the same request has the same hash", () => {
  it("whatever the order of its keys, and −0 is 0", () => {
    const reordered = Object.fromEntries(Object.entries(sound).reverse());
    expect(requestHash(reordered)).toBe(requestHash(sound));
    expect(canonicalJson({ b: -0, a: [1e21, 0.1] })).toBe('{"a":[1e+21,0.1],"b":0}');
  });

  it("is SHA-256: the empty object's digest is the published one (FIPS 180-4 of the two bytes {})", () => {
    expect(requestHash({})).toBe("44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a");
  });
});

describe("COMMAND: requests in, reports out", () => {
  const folder = mkdtempSync(join(tmpdir(), "loadline-price-"));
  const run = (file: string) =>
    spawnSync(process.execPath, ["--import", "tsx", "lib/pricing/cli/main.ts", file], { encoding: "utf8" });

  it("a request gives its report and exit code 0", () => {
    const file = join(folder, "request.json");
    writeFileSync(file, JSON.stringify(sound));
    const { status, stdout } = run(file);
    expect(status).toBe(0);
    const outcome = price(sound);
    expect(stdout).toBe(`${JSON.stringify(outcome.ok && outcome.report)}\n`);
  });

  it("lines come in order, a refused one as errors, exit code 2; 1e999 is refused with its path", () => {
    const file = join(folder, "requests.jsonl");
    const bad = JSON.stringify(sound).replace('"rho":0.3', '"rho":1e999');
    writeFileSync(file, `${JSON.stringify(sound)}\n${bad}\n${JSON.stringify(sound)}\n`);
    const { status, stdout } = run(file);
    const lines = stdout
      .trim()
      .split("\n")
      .map((line) => JSON.parse(line));
    expect(status).toBe(2);
    expect(lines).toHaveLength(3);
    expect(lines[1].errors[0].path).toBe("correlation.rho");
    expect(lines[0]).toEqual(lines[2]);
  });
});

describe("TYPES: request and report", () => {
  it("are what the contract says", () => {
    expectTypeOf<PricingRequest["format"]>().toEqualTypeOf<1>();
    expectTypeOf<PricingRequest["pool"][number]["notional"]>().toBeNumber();
    expectTypeOf<PricingRequest["correlation"]["kind"]>().toEqualTypeOf<
      "flat" | "loadings" | "sector" | "base"
    >();
    expectTypeOf<PricingRequest["pool"][number]["credit"]["kind"]>().toEqualTypeOf<
      "hazard" | "yearly" | "cumulative" | "spread" | "upfront" | "defaulted"
    >();
    expectTypeOf<PricingRequest["schedule"]["kind"]>().toEqualTypeOf<"even" | "standard">();
    expectTypeOf<PricingRequest["discount"]["kind"]>().toEqualTypeOf<"flat" | "zero" | "par">();
    expectTypeOf<NonNullable<PricingRequest["include"]>[number]>().toEqualTypeOf<
      "lossLaw" | "timeline" | "impliedCorrelation" | "sensitivities" | "pairs" | "audit"
    >();
    expectTypeOf<PricingReport["tranches"][number]["parSpread"]>().toEqualTypeOf<number | null>();
    expectTypeOf<PricingReport["numericalError"]>().toEqualTypeOf<number>();
    expectTypeOf<PricingReport["pool"]["unit"]>().toEqualTypeOf<number | null>();
    expectTypeOf<PricingReport["nthToDefault"][number]>().toEqualTypeOf<{
      n: number;
      probability: number;
      protectionLeg: number;
      annuity: number;
      parSpread: number | null;
    }>();
  });
});
