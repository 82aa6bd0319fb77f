import fc from "fast-check";
import { afterAll, describe, expect, it } from "vitest";
import { mustHold, printTally } from "./mustHold";
import { sectorSeed, seeds } from "./requests";

afterAll(() => printTally("Structured fuzz"));

const hostile = fc.oneof(
  fc.constantFrom<unknown>(
    -1,
    0,
    -0,
    1,
    2,
    1e-300,
    5e-324,
    1e300,
    1.797e308,
    Number.NaN,
    Number.POSITIVE_INFINITY,
  ),
  fc.constantFrom<unknown>(
    null,
    true,
    "",
    "0",
    "2026-02-30",
    "__proto__",
    "constructor",
    [],
    {},
    [[]],
    [null],
  ),
  fc.double(),
  fc.integer(),
  fc.string({ unit: "binary", maxLength: 12 }),
  fc.anything({ maxDepth: 3, withBigInt: true, withDate: true, withSparseArray: true }),
);

/** Every place in a JSON value, as the container and the key in it. */
function places(
  value: unknown,
  found: [Record<string, unknown>, string][] = [],
): [Record<string, unknown>, string][] {
  if (typeof value !== "object" || value === null) return found;
  for (const [key, inner] of Object.entries(value)) {
    found.push([value as Record<string, unknown>, key]);
    places(inner, found);
  }
  return found;
}

type Change = readonly [place: number, how: number, value: unknown];
const changes = fc.array(fc.tuple(fc.nat(), fc.nat({ max: 9 }), hostile), { minLength: 1, maxLength: 3 });

/** A copy with some places replaced, dropped, doubled or joined by a field that nobody knows. */
function changed(seed: unknown, list: readonly Change[]): unknown {
  const copy = structuredClone(seed);
  for (const [place, how, value] of list) {
    const all = places(copy);
    const [container, key] = all[place % all.length]!;
    if (how === 0) delete container[key];
    else if (how === 1 && Array.isArray(container)) container.push(structuredClone(container[Number(key)]));
    else if (how === 2) container[`x${key}`] = value;
    else container[key] = value;
  }
  return copy;
}

describe("FUZZ: sound requests changed, never an exception, a number that is not finite, or a hang", () => {
  it("requests of every kind with one to three places replaced by anything", () => {
    fc.assert(
      fc.property(fc.nat(), changes, (pick, list) => {
        mustHold(changed(seeds[pick % seeds.length], list));
      }),
      { numRuns: 4_000 },
    );
  });

  it("sectors, which cost far more: some", () => {
    fc.assert(
      fc.property(changes, (list) => {
        mustHold(changed(sectorSeed, list));
      }),
      { numRuns: 100, seed: 1 },
    );
  });

  it("the requests they start from are sound", () => {
    for (const seed of [...seeds, sectorSeed]) {
      const outcome = mustHold(seed);
      expect(outcome.ok ? [] : outcome.problems).toEqual([]);
    }
  });
});
