import { afterAll, describe, expect, it } from "vitest";
import { basketChecks } from "./published/baskets";
import type { Check, Published } from "./published/check";
import { defaultSwapChecks } from "./published/defaultSwaps";
import { largePoolChecks } from "./published/largePool";
import { normalChecks } from "./published/normal";
import { quadratureChecks } from "./published/quadrature";
import { trancheChecks } from "./published/tranches";
import { data } from "./support/data";
import { LargestErrors } from "./support/largestErrors";

const checks: readonly Check[] = [
  ...normalChecks,
  ...quadratureChecks,
  ...largePoolChecks,
  ...defaultSwapChecks,
  ...trancheChecks,
  ...basketChecks,
];

const published = data<Published[]>("published.json");
const fromPrint = new LargestErrors("Published figures: absolute difference from the print");
const fromRecomputation = new LargestErrors(
  "Published figures: relative difference from an independent recomputation",
);
afterAll(() => {
  fromPrint.print();
  fromRecomputation.print();
});

function listed(value: number | readonly number[]): readonly number[] {
  return typeof value === "number" ? [value] : value;
}

// Each title names its source; figures that were not read in a copy of it say "from memory".
for (const topic of new Set(published.map((entry) => entry.topic))) {
  describe(`published: ${topic}`, () => {
    for (const entry of published.filter((candidate) => candidate.topic === topic)) {
      const memory = entry.basis === "from memory" ? " (from memory)" : "";
      it(`${entry.id}: ${entry.source}, ${entry.where}${memory}`, () => {
        const check = checks.find(({ of }) => of.test(entry.id));
        expect(check, "no check runs this entry").toBeDefined();
        const found = check!.compute(entry);
        const printed = listed(entry.value);
        const recomputed = listed(entry.recomputed);
        expect(found).toHaveLength(printed.length);
        const scale = Math.max(...recomputed.map(Math.abs)) || 1;
        const allowed = check!.approximation?.tolerance ?? entry.absoluteTolerance;
        for (const [i, figure] of found.entries()) {
          const error = Math.abs(figure - printed[i]!);
          fromPrint.note(topic, error, allowed, entry.id);
          expect(error, `figure ${i} is ${figure}, printed ${printed[i]}`).toBeLessThanOrEqual(allowed);
          const difference = Math.abs(figure - recomputed[i]!) / scale;
          const agreement = check!.agreement ?? 1e-9;
          fromRecomputation.note(topic, difference, agreement, entry.id);
          expect(difference, `figure ${i} is ${figure}, recomputed ${recomputed[i]}`).toBeLessThanOrEqual(
            agreement,
          );
        }
      });
    }
  });
}
