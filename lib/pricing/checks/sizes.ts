import { LIMITS } from "../request";
import { asObject, type Loose } from "./loose";

/**
 * The request with lists beyond their limit cut one item above it: still refused by the limit's name, but a list of
 * millions is not walked through first.
 */
export function cutLists(raw: unknown): unknown {
  if (typeof raw !== "object" || raw === null || Array.isArray(raw)) return raw;
  const request = raw as Loose;
  const correlation = replaced(
    replaced(request.correlation, "nodes", (nodes) => cut(nodes, LIMITS.quotes)),
    "quotes",
    (quotes) => cut(quotes, LIMITS.quotes),
  );
  return Object.entries({
    pool: cutPool(request.pool),
    tranches: cut(request.tranches, LIMITS.tranches),
    nthToDefault: cut(request.nthToDefault, LIMITS.contracts),
    include: cut(request.include, LIMITS.contracts),
    schedule: replaced(request.schedule, "holidays", (holidays) => cut(holidays, LIMITS.holidays)),
    discount: replaced(request.discount, "nodes", (nodes) => cut(nodes, LIMITS.nodes)),
    correlation: replaced(correlation, "index", (index) => replaced(index, "pool", cutPool)),
  }).reduce<unknown>((whole, [key, value]) => replaced(whole, key, () => value), raw);
}

function cutPool(pool: unknown): unknown {
  const names = cut(pool, LIMITS.names);
  if (!Array.isArray(names)) return names;
  const isLong = names.some((name) => isTooLong(asObject(asObject(name).credit).nodes, LIMITS.nodes));
  if (!isLong) return names;
  return names.map((name) =>
    replaced(name, "credit", (credit) => replaced(credit, "nodes", (nodes) => cut(nodes, LIMITS.nodes))),
  );
}

function isTooLong(list: unknown, most: number): boolean {
  return Array.isArray(list) && list.length > most + 1;
}

function cut(list: unknown, most: number): unknown {
  return isTooLong(list, most) ? (list as unknown[]).slice(0, most + 1) : list;
}

/** The object with one of its own fields changed; itself where nothing changes. */
function replaced(value: unknown, key: string, change: (field: unknown) => unknown): unknown {
  if (typeof value !== "object" || value === null || !Object.hasOwn(value, key)) return value;
  const field = (value as Loose)[key];
  const next = change(field);
  return next === field ? value : { ...value, [key]: next };
}
