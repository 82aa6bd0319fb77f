import { readFileSync } from "node:fs";
import { join } from "node:path";

const SOURCE = join(process.cwd(), "lib", "quant", "kernel", "assembly", "recursion.ts");

/** Where the compiled kernel is kept, so that a clean clone, a browser bundle and a test all have it without a compiler. */
export const KERNEL_FILE = join(process.cwd(), "lib", "quant", "kernel", "recursionModule.generated.ts");

const OPTIONS = [
  "-O3",
  "--noAssert",
  "--converge",
  "--enable",
  "simd",
  "--runtime",
  "stub",
  "--initialMemory",
  "16",
];

/** The text of the generated file: the AssemblyScript kernel compiled, in base64. Throws with the compiler's words. */
export async function compiledKernelFile(): Promise<string> {
  const { main } = await import("assemblyscript/asc");
  let module: Uint8Array | null = null;
  const { error, stderr } = await main(["recursion.ts", ...OPTIONS, "--outFile", "recursion.wasm"], {
    readFile: (name) => (name === "recursion.ts" ? readFileSync(SOURCE, "utf8") : null),
    writeFile: (_, contents) => {
      if (typeof contents !== "string") module = contents;
    },
    listFiles: () => [],
  });
  if (error || !module) throw new Error(`The kernel does not compile. ${stderr.toString()}`);
  const text = Buffer.from(module).toString("base64");
  return `/** Generated from assembly/recursion.ts by \`npm run kernel\`. */\nexport const RECURSION_MODULE =\n  "${text}";\n`;
}
