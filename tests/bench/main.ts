/**
 * `npm run bench`: Loadline's speed beside yardsticks in the same interleaved run. `-- kernel prices drag sensitivities server`
 * runs only the parts named, `--rounds=9` sets the rounds, `--json` prints rows for a machine.
 */
import { mkdtempSync, rmSync } from "node:fs";
import { cpus, tmpdir } from "node:os";
import { join } from "node:path";
import { dragRows } from "./dragBench";
import { kernelRows } from "./kernelBench";
import { priceRows, sensitivityRows } from "./priceBench";
import { type BenchRow, benchText } from "./report";
import { serverRows } from "./serverBench";

const given = process.argv.slice(2);
const rounds = Number(given.find((option) => option.startsWith("--rounds="))?.split("=")[1] ?? 7);
const folder = mkdtempSync(join(tmpdir(), "loadline-bench-"));
const parts: Record<string, () => Promise<BenchRow[]>> = {
  kernel: () => kernelRows(folder, rounds),
  prices: () => priceRows(rounds),
  drag: dragRows,
  sensitivities: sensitivityRows,
  server: serverRows,
};
const asked = given.filter((option) => !option.startsWith("--"));
const unknown = asked.filter((name) => !(name in parts));
if (unknown.length > 0) {
  console.error(`There is no part ${unknown.join(", ")}; the parts are ${Object.keys(parts).join(", ")}.`);
  process.exit(2);
}

const machine = { processor: cpus()[0]?.model ?? "unknown", cores: cpus().length, node: process.version };
const rows: BenchRow[] = [];
try {
  for (const [name, run] of Object.entries(parts))
    if (asked.length === 0 || asked.includes(name)) rows.push(...(await run()));
} finally {
  rmSync(folder, { recursive: true, force: true });
}
const text = given.includes("--json")
  ? JSON.stringify({ machine, rounds, rows }, null, 2)
  : `${machine.processor}, ${machine.cores} cores, Node ${machine.node}, ${rounds} rounds\n${benchText(rows)}`;
process.stdout.write(`${text}\n`);
