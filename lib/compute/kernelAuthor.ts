import { writeFileSync } from "node:fs";
import { compiledKernelFile, KERNEL_FILE } from "./kernelModule";

/** `npm run kernel`: compiles the AssemblyScript kernel into the generated file that is committed. */
writeFileSync(KERNEL_FILE, await compiledKernelFile());
