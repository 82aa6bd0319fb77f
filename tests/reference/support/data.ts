import { readFileSync } from "node:fs";
import { join } from "node:path";

const folder = join(process.cwd(), "tests", "reference", "data");

/** The content of a data file; where each comes from stands in data/README.md. */
export function data<Content>(file: string): Content {
  return JSON.parse(readFileSync(join(folder, file), "utf8")) as Content;
}

/** The folder of the reference requests. */
export const casesFolder = join(folder, "cases");
