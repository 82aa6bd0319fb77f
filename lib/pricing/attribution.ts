import { canonicalJson } from "./canonical";
import { price } from "./price";
import type { PricingProblem } from "./problem";
import type { NameInput, PricingRequest } from "./request";

/** The parts of a request that can move a value, in the order in which they are changed. */
export const movers = ["names", "spreads", "discount", "correlation", "structure", "time"] as const;
export type Mover = (typeof movers)[number];

/** One step from the earlier request to the later one. `movers` has more than one when a step between could not be priced. */
export interface AttributionStep {
  readonly movers: readonly Mover[];
  /** Change of the value to the protection seller, in currency, by class id; null where a class has no value. */
  readonly byClass: Readonly<Record<string, number | null>>;
}

export interface Attribution {
  readonly before: Readonly<Record<string, number | null>>;
  readonly after: Readonly<Record<string, number | null>>;
  readonly steps: readonly AttributionStep[];
}

export type AttributionAnswer =
  | { readonly ok: true; readonly attribution: Attribution }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

type Values = Record<string, number | null>;

/**
 * What moved the value of each class between two requests: the later one's parts are taken over one after the other in the
 * stated order (names with their notionals and recoveries, spreads, discount curve, correlation and loss law, structure, time),
 * each step a full revaluation; the steps of a class sum to its whole change. A class that only one of the requests has is worth
 * nothing in the other. A step that cannot be priced by itself is taken together with the next one.
 */
export function attribute(before: PricingRequest, after: PricingRequest): AttributionAnswer {
  const start = valuesOf(before);
  if (!start.ok) return start;
  const steps: AttributionStep[] = [];
  let request = before;
  let values = start.values;
  let waiting: Mover[] = [];
  for (const mover of movers) {
    const next = taken[mover](request, after);
    const isSame = canonicalJson(next) === canonicalJson(request);
    request = next;
    if (isSame) continue;
    waiting.push(mover);
    const priced = valuesOf(request);
    if (!priced.ok) continue;
    steps.push({ movers: waiting, byClass: difference(values, priced.values) });
    waiting = [];
    values = priced.values;
  }
  const end = waiting.length > 0 ? valuesOf(request) : { ok: true as const, values };
  return end.ok ? { ok: true, attribution: { before: start.values, after: end.values, steps } } : end;
}

/** The request with one part of the later one in place of its own. */
const taken: Record<Mover, (request: PricingRequest, after: PricingRequest) => PricingRequest> = {
  names(request, after) {
    const credits = new Map(request.pool.map((name) => [name.id, name.credit]));
    return {
      ...request,
      pool: after.pool.map((name) => withCredit(name, credits.get(name.id))),
      ...currencyOf(after),
    };
  },
  spreads: (request, after) => ({ ...request, pool: after.pool }),
  discount: (request, after) => ({ ...request, discount: after.discount }),
  correlation: (request, after) => ({
    ...without(request, "law"),
    correlation: after.correlation,
    ...(after.law ? { law: after.law } : {}),
  }),
  structure: (request, after) => ({ ...request, tranches: after.tranches }),
  time: (_, after) => without(without(after, "include"), "nthToDefault"),
};

function withCredit(name: NameInput, credit: NameInput["credit"] | undefined): NameInput {
  return credit ? { ...name, credit } : name;
}

function currencyOf({ currency }: PricingRequest): Pick<PricingRequest, "currency"> {
  return currency === undefined ? {} : { currency };
}

function without<Key extends keyof PricingRequest>(request: PricingRequest, key: Key): PricingRequest {
  const { [key]: _, ...rest } = request;
  return rest as PricingRequest;
}

function valuesOf(
  request: PricingRequest,
): { ok: true; values: Values } | Extract<AttributionAnswer, { ok: false }> {
  const outcome = price(without(without(request, "include"), "nthToDefault"));
  if (!outcome.ok) return { ok: false, problems: outcome.problems };
  const { tranches } = outcome.report;
  return { ok: true, values: Object.fromEntries(tranches.map(({ id, sellerValue }) => [id, sellerValue])) };
}

function difference(before: Values, after: Values): Values {
  const ids = [...new Set([...Object.keys(before), ...Object.keys(after)])];
  return Object.fromEntries(
    ids.map((id) => {
      const [from, to] = [id in before ? before[id] : 0, id in after ? after[id] : 0];
      return [id, from === null || to === null || from === undefined || to === undefined ? null : to - from];
    }),
  );
}
