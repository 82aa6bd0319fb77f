import { execFileSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { wasmBackend } from "@/lib/quant/kernel/backend";
import { twinBackend } from "@/lib/quant/kernel/twin";
import type { BenchRow } from "./report";
import { type Arm, interleaved, timed } from "./rounds";
import { caseFile, KERNEL_CASES, type KernelCase } from "./yardstick/kernelCases";
import { kernelRun, momentRun } from "./yardstick/kernelRun";
import { canRun, startYardstick, type Yardstick } from "./yardstick/server";

const SOURCES = join(process.cwd(), "tests", "bench", "yardstick");
const SLOW_ROUNDS = 2;

/** The bare kernel beside C, its twin and NumPy on each case, in interleaved rounds. */
export async function kernelRows(folder: string, rounds: number): Promise<BenchRow[]> {
  const compiled = compiledYardstick(folder);
  const hasNumpy = canRun("python3", ["-c", "import numpy, scipy.special"]);
  const rows: BenchRow[] = [];
  for (const kernelCase of KERNEL_CASES) {
    const file = join(folder, `${kernelCase.id}.bin`);
    writeFileSync(file, new Uint8Array(caseFile(kernelCase).buffer));
    const c = compiled ? startYardstick(compiled, [file]) : null;
    const numpy = hasNumpy ? startYardstick("python3", [join(SOURCES, "recursion.py"), file]) : null;
    rows.push(...(await caseRows(kernelCase, c, numpy, rounds)));
    c?.end();
    numpy?.end();
  }
  return rows;
}

function compiledYardstick(folder: string): string | null {
  if (!canRun("gcc", ["--version"])) return null;
  const out = join(folder, "recursion");
  execFileSync("gcc", ["-O3", "-march=native", "-o", out, join(SOURCES, "recursion.c"), "-lm"]);
  return out;
}

async function caseRows(
  kernelCase: KernelCase,
  c: Yardstick | null,
  numpy: Yardstick | null,
  rounds: number,
): Promise<BenchRow[]> {
  const backend = wasmBackend();
  const arms = new Map<string, Arm>();
  if (c) arms.set("C", { run: c.run });
  if (backend) arms.set("WebAssembly", timed(kernelRun(kernelCase, backend)));
  arms.set("twin", timed(kernelRun(kernelCase, twinBackend())));
  if (kernelCase.id === "L") arms.set("cumulants", timed(momentRun(kernelCase)));
  if (numpy) arms.set("NumPy", { run: numpy.run, most: SLOW_ROUNDS });
  const times = await interleaved(arms, rounds);
  backend?.takeWork();
  const values = kernelRun(kernelCase, backend ?? twinBackend())();
  const work = backend?.takeWork() ?? 0;
  const reference = await c?.values();
  const difference = reference
    ? Math.max(...reference.map((value, i) => Math.abs(value - values[i]!)))
    : null;
  const of = { C: times.get("C"), NumPy: times.get("NumPy") };
  return [...times].map(([name, time]) => ({
    group: `kernel ${kernelCase.id}: ${kernelCase.title}`,
    name,
    ...time,
    ratios: {
      ...(of.C ? { "to C": time.minimum / of.C.minimum } : {}),
      ...(of.NumPy ? { "NumPy to it": of.NumPy.minimum / time.minimum } : {}),
    },
    ...(name === "WebAssembly" ? { work, difference } : {}),
  }));
}
