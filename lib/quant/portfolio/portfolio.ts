import { defaultProbability, type SurvivalCurve, survivalProbability } from "../market/survivalCurve";
import { defaultThreshold } from "./thresholds";

/** One credit of a pool, its curve built. Money in the deal's currency. */
export interface PortfolioName {
  readonly id: string;
  readonly notional: number;
  readonly recovery: number;
  readonly curve: SurvivalCurve;
  readonly loading: number | null;
  readonly sector: string | null;
}

/** A name still alive at the start, in the order in which sums are taken. */
export interface LiveName {
  /** Position in the pool as given. */
  readonly position: number;
  /** w_i (1 − R_i) and w_i R_i: fractions of the pool's notional. */
  readonly loss: number;
  readonly recovered: number;
  readonly loading: number | null;
  readonly sector: string | null;
}

/** A pool at the dates of a schedule: index 0 is the start, 1..M the payment dates. */
export interface Portfolio {
  readonly names: readonly PortfolioName[];
  readonly notional: number;
  readonly times: readonly number[];
  readonly live: readonly LiveName[];
  /** Losses and recoveries of names already in default. */
  readonly realisedLoss: number;
  readonly realisedRecovery: number;
  /** thresholds[j][k]: c of live name k at date j (j ≥ 1). */
  readonly thresholds: readonly Float64Array[];
  /** Expected loss of the whole pool at each date, realised loss included. */
  readonly expectedLoss: Float64Array;
  /** Expected undefaulted share of the notional at each date. */
  readonly surviving: Float64Array;
  /** Expected number of defaults by the last date, names already in default included. */
  readonly expectedDefaults: number;
}

/**
 * Lays a pool on dates. Live names are put in an order of their own (by loss, then riskiness), so that permuting the
 * pool changes no figure.
 */
export function portfolioOf(names: readonly PortfolioName[], times: readonly number[]): Portfolio {
  const notional = sumOf(names.map((name) => name.notional));
  const last = times[times.length - 1]!;
  const live: LiveName[] = [];
  const realised = { loss: [] as number[], recovery: [] as number[] };
  for (const [position, name] of names.entries()) {
    const share = name.notional / notional;
    const loss = share * (1 - name.recovery);
    const recovered = share * name.recovery;
    if (name.curve.defaulted) {
      realised.loss.push(loss);
      realised.recovery.push(recovered);
    } else live.push({ position, loss, recovered, loading: name.loading, sector: name.sector });
  }
  const riskiness = names.map((name) => defaultThreshold(name.curve, last));
  live.sort(
    (one, other) =>
      one.loss - other.loss ||
      riskiness[one.position]! - riskiness[other.position]! ||
      (one.loading ?? 0) - (other.loading ?? 0) ||
      one.recovered - other.recovered,
  );
  const realisedLoss = sumOf(realised.loss);
  const dates = [0, ...times];
  const curves = live.map((name) => names[name.position]!.curve);
  const thresholds = dates.map((time) =>
    time === 0 ? new Float64Array(0) : Float64Array.from(curves, (curve) => defaultThreshold(curve, time)),
  );
  const expectedLoss = Float64Array.from(dates, (time) =>
    time === 0
      ? realisedLoss
      : realisedLoss + sumOf(live.map((name, k) => name.loss * defaultProbability(curves[k]!, time))),
  );
  const surviving = Float64Array.from(dates, (time) =>
    sumOf(
      live.map(
        (name, k) => (name.loss + name.recovered) * (time === 0 ? 1 : survivalProbability(curves[k]!, time)),
      ),
    ),
  );
  const expectedDefaults =
    names.length - live.length + sumOf(curves.map((curve) => defaultProbability(curve, last)));
  return {
    names,
    notional,
    times: dates,
    live,
    realisedLoss,
    realisedRecovery: sumOf(realised.recovery),
    thresholds,
    expectedLoss,
    surviving,
    expectedDefaults,
  };
}

/** Sum in ascending order of size, the same for every order of the terms. */
export function sumOf(terms: readonly number[]): number {
  let sum = 0;
  for (const term of [...terms].sort((a, b) => Math.abs(a) - Math.abs(b) || a - b)) sum += term;
  return sum;
}
