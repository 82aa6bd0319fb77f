import { availableParallelism } from "node:os";
import { Piscina } from "piscina";
import { answer } from "../../compute/answer";
import type { PricingAnswer } from "../../compute/protocol";
import { workerFile } from "../../compute/workerFile";

/** What a line of input comes to: the report's text, or what is wrong. */
export type Line =
  | { readonly report: string }
  | { readonly errors: readonly { readonly path: string; readonly message: string }[] };

/** Fewer lines than this are priced sooner than threads start. */
const WORTH_THREADS = 16;
/** Lines under way for each thread: enough to keep it busy, few enough to hold in memory. */
const AHEAD = 4;

/** Prices one request's text in this thread. */
export function pricedHere(text: string): Line {
  const read = parsed(text);
  if ("errors" in read) return read;
  return lineOf(answer(read.raw));
}

/** Prices requests a line each, in their order, on every core; lines that are empty are passed over. */
export async function* pricedLines(texts: AsyncIterable<string>): AsyncGenerator<Line> {
  const first: string[] = [];
  const rest = texts[Symbol.asyncIterator]();
  for (let next = await rest.next(); !next.done; next = await rest.next()) {
    if (next.value.trim() !== "") first.push(next.value);
    if (first.length >= WORTH_THREADS) break;
  }
  if (first.length < WORTH_THREADS) {
    for (const text of first) yield pricedHere(text);
    return;
  }
  const threads = availableParallelism();
  const pool = new Piscina<{ kind: "price"; input: unknown }, PricingAnswer>({
    filename: await workerFile(),
    minThreads: threads,
    maxThreads: threads,
  });
  try {
    const under: Promise<Line>[] = first.map((text) => pricedIn(pool, text));
    for (let next = await rest.next(); !next.done; next = await rest.next()) {
      if (next.value.trim() === "") continue;
      under.push(pricedIn(pool, next.value));
      while (under.length > AHEAD * threads) yield await under.shift()!;
    }
    for (const line of under) yield await line;
  } finally {
    await pool.destroy();
  }
}

async function pricedIn(
  pool: Piscina<{ kind: "price"; input: unknown }, PricingAnswer>,
  text: string,
): Promise<Line> {
  const read = parsed(text);
  if ("errors" in read) return read;
  return lineOf(await pool.run({ kind: "price", input: read.raw }));
}

function parsed(text: string): { readonly raw: unknown } | Extract<Line, { errors: unknown }> {
  try {
    return { raw: JSON.parse(text) };
  } catch (error) {
    return {
      errors: [{ path: "", message: `This is not JSON: ${error instanceof Error ? error.message : error}.` }],
    };
  }
}

function lineOf(priced: PricingAnswer): Line {
  if (priced.ok) return { report: priced.report };
  return { errors: priced.problems.map(({ path, message }) => ({ path, message })) };
}
