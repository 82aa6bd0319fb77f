import { describe, expect, it } from "vitest";
import { mustHold } from "./mustHold";
import { seeds } from "./requests";

const sound = seeds[0]!;
const MANY = 1_000_000;

function many<Item>(make: (i: number) => Item): Item[] {
  return Array.from({ length: MANY }, (_, i) => make(i));
}

function deep(levels: number, wrap: (inner: unknown) => unknown): unknown {
  let value: unknown = 1;
  for (let level = 0; level < levels; level++) value = wrap(value);
  return value;
}

const name = sound.pool[0]!;
const standard = { kind: "standard", maturity: "2031-06-20" };

const oversized: Record<string, [request: unknown, path: string, limit: string]> = {
  "a million names": [{ ...sound, pool: many((i) => ({ ...name, id: `N${i}` })) }, "pool", "20000 names"],
  "a million things that are no names": [{ ...sound, pool: many(() => 0) }, "pool", "20000 names"],
  "a million classes": [
    { ...sound, tranches: many((i) => ({ id: `T${i}`, attachment: 0, detachment: 0.3 })) },
    "tranches",
    "200 tranches",
  ],
  "a million holidays": [
    { ...sound, pricingDate: "2026-03-20", schedule: { ...standard, holidays: many(() => "2027-01-01") } },
    "schedule.holidays",
    "5000 holidays",
  ],
  "a million curve nodes": [
    { ...sound, discount: { kind: "zero", nodes: many((i) => ({ years: i + 1, rate: 0.01 })) } },
    "discount.nodes",
    "200 nodes",
  ],
  "a million contracts": [{ ...sound, nthToDefault: many(() => 1) }, "nthToDefault", "200 contracts"],
  "schedules of 2 000 payments": [
    { ...sound, schedule: { kind: "even", years: 200, perYear: 10 } },
    "schedule.years",
    "100",
  ],
};

describe("FUZZ: a request beyond a limit is refused by a sentence that names the limit, and soon", () => {
  for (const [title, [request, path, limit]] of Object.entries(oversized)) {
    it(title, () => {
      const outcome = mustHold(request);
      expect(outcome.ok).toBe(false);
      const problem = outcome.ok ? undefined : outcome.problems.find((candidate) => candidate.path === path);
      expect(problem?.message).toContain(limit);
    });
  }

  it("JSON nested 100 000 deep is refused wherever it stands", () => {
    const list = deep(100_000, (inner) => [inner]);
    const object = deep(100_000, (inner) => ({ a: inner }));
    for (const nested of [list, object]) {
      expect(mustHold(nested).ok).toBe(false);
      for (const key of Object.keys(sound)) expect(mustHold({ ...sound, [key]: nested }).ok).toBe(false);
      expect(mustHold({ ...sound, pool: [{ ...name, credit: nested }] }).ok).toBe(false);
      expect(mustHold({ ...sound, unknown: nested }).ok).toBe(false);
    }
  });

  it("texts of ten million characters are refused, and quoted short", () => {
    const outcome = mustHold({
      ...sound,
      currency: "E".repeat(1e7),
      pool: [{ ...name, id: "N".repeat(1e7) }],
    });
    expect(outcome.ok).toBe(false);
    if (!outcome.ok) for (const { message } of outcome.problems) expect(message.length).toBeLessThan(400);
  });
});

describe("REFUSE: all problems at once", () => {
  const mistakes: Record<string, (request: Record<string, unknown>) => void> = {
    "pool.0.recovery": (request) => set(request, ["pool", "0", "recovery"], 1),
    "pool.1.notional": (request) => set(request, ["pool", "1", "notional"], 0),
    "pool.2.credit.nodes.1": (request) =>
      set(request, ["pool", "2", "credit", "nodes", "1", "probability"], 0.001),
    "pool.3.id": (request) => set(request, ["pool", "3", "id"], "A"),
    "pool.4.credit.coupon": (request) => set(request, ["pool", "4", "credit", "coupon"], -1),
    "correlation.rho": (request) => set(request, ["correlation", "rho"], 1.5),
    "tranches.0": (request) => set(request, ["tranches", "0", "attachment"], 0.2),
    "tranches.1.running": (request) => set(request, ["tranches", "1", "running"], Number.NaN),
    "discount.rate": (request) => set(request, ["discount", "rate"], Number.POSITIVE_INFINITY),
    "nthToDefault.1": (request) => set(request, ["nthToDefault", "1"], 7),
    "schedule.perYear": (request) => set(request, ["schedule", "perYear"], 0),
    surprise: (request) => set(request, ["surprise"], 1),
  };

  function set(container: Record<string, unknown>, [key, ...rest]: string[], value: unknown): void {
    if (rest.length === 0) container[key!] = value;
    else set(container[key!] as Record<string, unknown>, rest, value);
  }

  it("every set of mistakes, of the 4 096 that twelve make, is named whole", () => {
    const entries = Object.entries(mistakes);
    for (let chosen = 1; chosen < 2 ** entries.length; chosen++) {
      const request = structuredClone(sound) as unknown as Record<string, unknown>;
      const made = entries.filter((_, i) => (chosen >> i) & 1);
      for (const [, make] of made) make(request);
      const outcome = mustHold(request);
      const paths = outcome.ok ? [] : outcome.problems.map(({ path }) => path);
      const unnamed = made
        .map(([path]) => path)
        .filter((path) => !paths.some((known) => known === path || known.startsWith(`${path}.`)));
      expect(unnamed, `set ${chosen}`).toEqual([]);
    }
  });
});
