import fc from "fast-check";
import Papa from "papaparse";
import { describe, expect, it } from "vitest";
import { safeCell, toCsv } from "@/lib/platform/csv";
import { poolCsv } from "@/lib/pools/export";
import { readPool } from "@/lib/pools/import/read";
import type { NameInput } from "@/lib/pricing/request";

describe("exporting a pool", () => {
  it.each(["=1+1", "+cmd", "-2+3", "@sum", "\tx", "\rx"])(
    "writes the text %j with an apostrophe, so that no spreadsheet runs it (OWASP, CSV Injection)",
    (text) => {
      expect(safeCell(text)).toBe(`'${text}`);
    },
  );

  it("never touches numbers, negative ones included", () => {
    expect(toCsv(["a"], [[-1.5], ["-1.5"]])).toBe("\ufeffa\r\n-1.5\r\n-1.5\r\n");
  });

  it("quotes what RFC 4180 wants quoted, and another reader gets it back", () => {
    const csv = toCsv(["a", "b"], [['say "hi"', "x,y\nz"]]);
    expect(Papa.parse(csv.slice(1).trim()).data).toEqual([
      ["a", "b"],
      ['say "hi"', "x,y\nz"],
    ]);
  });

  it("keeps every name through export and import, whatever its credit input", () => {
    const text = fc.stringMatching(/^[A-Za-z=+@"',;][A-Za-z0-9 ,;"'&.=-]{0,20}[A-Za-z0-9]$/);
    const years = fc.uniqueArray(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 3 });
    const share = fc.double({ min: 0.001, max: 0.29, noNaN: true });
    const credit = fc.oneof(
      share.map((rate) => ({ kind: "hazard" as const, rate })),
      share.map((probability) => ({ kind: "yearly" as const, probability })),
      fc.tuple(years, share).map(([list, value]) => ({
        kind: "spread" as const,
        nodes: list.sort((a, b) => a - b).map((tenor) => ({ years: tenor, spread: value })),
      })),
      fc.tuple(years, share).map(([list, value]) => ({
        kind: "cumulative" as const,
        nodes: list.sort((a, b) => a - b).map((tenor) => ({ years: tenor, probability: value })),
      })),
      fc
        .tuple(share, share)
        .map(([upfront, coupon]) => ({ kind: "upfront" as const, years: 5, upfront, coupon })),
      fc.constant({ kind: "defaulted" as const }),
    );
    const name = fc.record({
      name: text,
      sector: text,
      notional: fc.double({ min: 1, max: 1e12, noNaN: true }),
      recovery: fc.double({ min: 0, max: 0.99, noNaN: true }),
      credit,
    });
    fc.assert(
      fc.property(fc.array(name, { minLength: 1, maxLength: 6 }), (list) => {
        const names: NameInput[] = list.map((entry, i) => ({ id: `N${i}`, ...entry }));
        const reading = readPool(poolCsv(names));
        expect(reading.problems).toEqual([]);
        expect(reading.tableProblems).toEqual([]);
        expect(reading.names).toEqual(names);
      }),
      { numRuns: 200 },
    );
  });
});
