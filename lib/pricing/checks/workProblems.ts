import { parseDay } from "../../quant/market/calendar";
import type { PricingProblem } from "../problem";
import { LIMITS, type PricingRequest } from "../request";

/** A grid has at least about this many steps where a pool is small. */
const LEAST_STEPS = 2_500;
/** Laws that a search over correlations asks for: sampled, then polished tranche by tranche or quote by quote. */
const SEARCH_SAMPLES = 33;
const SEARCH_STEPS = 12;
const DAYS_A_QUARTER = 91;

/** A request whose sizes pass one by one but ask for more work together than one pricing may take. */
export function workProblems(request: PricingRequest): PricingProblem[] {
  const payments = paymentCount(request);
  const names = request.pool.length;
  const valuations = valuationCount(request);
  const work =
    valuations * payments * names * Math.max(names, LEAST_STEPS) + bootstrapWork(request, payments);
  if (work <= LIMITS.work) return [];
  const times = (work / LIMITS.work).toFixed(1);
  const message = `The request asks for ${valuations} valuations of ${names} names on ${payments} dates: ${times} times the work that is priced at once (limit ${LIMITS.work} steps). Take fewer names or dates, or leave extras such as sensitivities out.`;
  return [{ code: "limit", path: request.include?.includes("sensitivities") ? "include" : "pool", message }];
}

function paymentCount({ schedule, pricingDate }: PricingRequest): number {
  if (schedule.kind === "even") return Math.max(1, Math.round(schedule.years * schedule.perYear));
  const [from, to] = [parseDay(pricingDate ?? ""), parseDay(schedule.maturity)];
  return from === null || to === null ? 1 : Math.max(1, Math.ceil((to - from) / DAYS_A_QUARTER));
}

/** How often the pool is valued: once, per bump, and per step of a search. */
function valuationCount({ pool, include = [], tranches, correlation }: PricingRequest): number {
  let count = 1;
  if (include.includes("sensitivities")) count += 8 + 2 * distinctNames(pool);
  if (include.includes("impliedCorrelation"))
    count += SEARCH_SAMPLES + SEARCH_STEPS * tranches.filter(({ upfront }) => upfront !== undefined).length;
  if ("quotes" in correlation) count += SEARCH_STEPS * correlation.quotes.length;
  return count;
}

/** Names alike in everything but their id are bumped once. */
function distinctNames(pool: PricingRequest["pool"]): number {
  return new Set(pool.map(({ id: _, name: __, ...rest }) => JSON.stringify(rest))).size;
}

/** Each node of a spread curve is solved over all payments and nodes before it. */
function bootstrapWork({ pool }: PricingRequest, payments: number): number {
  return pool.reduce(
    (sum, { credit }) => (credit.kind === "spread" ? sum + credit.nodes.length ** 2 * payments : sum),
    0,
  );
}
