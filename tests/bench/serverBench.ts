import { closeCompute, priceOnServer } from "@/lib/compute/serverPool";
import { flat, mixedPool, structure } from "./priceCases";
import type { BenchRow } from "./report";

const PEOPLE = 8;
const EACH = 5;

/** Requests a second through the server's threads: eight people ask for five prices each, one after another. */
export async function serverRows(): Promise<BenchRow[]> {
  const request = structure(mixedPool(125), flat);
  const count = PEOPLE * EACH;
  await priceOnServer(request, "warm-up");
  const start = performance.now();
  await Promise.all(
    Array.from({ length: PEOPLE }, async (_, person) => {
      for (let i = 0; i < EACH; i++) await priceOnServer(request, `person ${person}`);
    }),
  );
  const each = (performance.now() - start) / count;
  await closeCompute();
  return [
    {
      group: "server: threads, 125 mixed names, ρ 0.3",
      name: `${count} requests of ${PEOPLE} people`,
      minimum: each,
      median: each,
      ratios: { "requests a second": 1000 / each },
    },
  ];
}
