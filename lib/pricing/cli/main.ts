/** `npm run --silent price -- request.json | requests.jsonl | -`: requests in, reports out, no database. */
import { once } from "node:events";
import { createReadStream, readFileSync } from "node:fs";
import { createInterface } from "node:readline";
import { pricedHere, pricedLines } from "./lines";

async function priceLines(file: string): Promise<number> {
  let code = 0;
  const texts = createInterface({ input: createReadStream(file), crlfDelay: Number.POSITIVE_INFINITY });
  for await (const line of pricedLines(texts)) {
    if ("errors" in line) code = 2;
    const isWritten = process.stdout.write(`${"report" in line ? line.report : JSON.stringify(line)}\n`);
    if (!isWritten) await once(process.stdout, "drain");
  }
  return code;
}

function priceOne(text: string): number {
  const line = pricedHere(text);
  if ("errors" in line) {
    process.stderr.write(`${JSON.stringify(line)}\n`);
    return 2;
  }
  process.stdout.write(`${line.report}\n`);
  return 0;
}

async function main([file]: string[]): Promise<number> {
  if (!file) {
    process.stderr.write(
      "Say: npm run --silent price -- request.json, requests.jsonl, or - for standard input.\n",
    );
    return 2;
  }
  try {
    return file.endsWith(".jsonl")
      ? await priceLines(file)
      : priceOne(readFileSync(file === "-" ? 0 : file, "utf8"));
  } catch (error) {
    process.stderr.write(
      `${JSON.stringify({ errors: [{ path: "", message: `The file cannot be read: ${error instanceof Error ? error.message : error}.` }] })}\n`,
    );
    return 2;
  }
}

process.exitCode = await main(process.argv.slice(2));
