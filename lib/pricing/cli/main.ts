/** `npm run --silent price -- request.json | requests.jsonl | -`: requests in, reports out, no database. */
import { createReadStream, readFileSync } from "node:fs";
import { createInterface } from "node:readline";
import { price } from "../price";
import type { PricingProblem } from "../problem";

type Line = { readonly report: string } | { readonly errors: readonly { path: string; message: string }[] };

function priced(text: string): Line {
  let raw: unknown;
  try {
    raw = JSON.parse(text);
  } catch (error) {
    return {
      errors: [{ path: "", message: `This is not JSON: ${error instanceof Error ? error.message : error}.` }],
    };
  }
  const outcome = price(raw);
  return outcome.ok
    ? { report: JSON.stringify(outcome.report) }
    : { errors: outcome.problems.map(pathAndMessage) };
}

function pathAndMessage({ path, message }: PricingProblem): { path: string; message: string } {
  return { path, message };
}

async function priceLines(file: string): Promise<number> {
  let code = 0;
  for await (const text of createInterface({
    input: createReadStream(file),
    crlfDelay: Number.POSITIVE_INFINITY,
  })) {
    if (text.trim() === "") continue;
    const line = priced(text);
    if ("errors" in line) code = 2;
    process.stdout.write(`${"report" in line ? line.report : JSON.stringify(line)}\n`);
  }
  return code;
}

function priceOne(text: string): number {
  const line = priced(text);
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
