import { amountBetween, trancheProfile } from "../quant/tranche/expectedLoss";
import { contractLegs, parSpread } from "../quant/tranche/legs";
import type { PricingProblem } from "./problem";
import { checkRequest } from "./refusals";
import type { PricingRequest } from "./request";
import { probabilityAbove, strikesOfTranche } from "./trancheSection";
import { type Valuation, valuationOf } from "./valuation";

/** What a class may be held to. Decimals of the class's own notional. */
export const limitKinds = ["expectedLoss", "hitProbability", "parSpread"] as const;
export type LimitKind = (typeof limitKinds)[number];

/** A class to be placed, with the most that each of its figures may be. */
export interface SizingTarget {
  readonly id: string;
  readonly limits: Partial<Readonly<Record<LimitKind, number>>>;
}

export interface SizingInput {
  /** Everything but the classes, which are placed here. */
  readonly request: unknown;
  /** Where the highest class detaches. */
  readonly top: number;
  /** From the top down. */
  readonly targets: readonly SizingTarget[];
  /** Boundaries are rounded up to a multiple of this, so that the limits still hold. */
  readonly step: number;
}

/** How a class was placed, or why it could not be. */
export type SizedClass =
  | {
      readonly id: string;
      readonly ok: true;
      readonly attachment: number;
      readonly detachment: number;
      /** The limit that stopped the class from reaching lower; null when it takes all that is left. */
      readonly binding: LimitKind | null;
      readonly figures: Readonly<Record<LimitKind, number | null>>;
    }
  | {
      readonly id: string;
      readonly ok: false;
      readonly reason: "noRoom" | "noLimit" | "tooTight" | "unreadable";
      readonly detachment: number;
      /** For a limit that is too tight: which, and the least that the figure can be below this detachment. */
      readonly limit?: LimitKind;
      readonly least?: number;
    };

export type SizingAnswer =
  | {
      readonly ok: true;
      readonly classes: readonly SizedClass[];
      /** What is left below the lowest placed class. */
      readonly left: number;
    }
  | { readonly ok: false; readonly problems: readonly PricingProblem[] };

const LAW_STRIKES = 24;
const SCAN = 48;
const BISECTIONS = 40;

/**
 * Places boundaries from the top down: each class reaches as low as all its limits allow, and the next one begins there.
 * Every figure grows as a class reaches lower under one law; under a base curve, where it may not, a class stops at the
 * first strike on its way down that breaks a limit. A class that cannot be placed ends the search.
 */
export function sizeClasses({ request: raw, top, targets, step }: SizingInput): SizingAnswer {
  const checked = checkRequest({ ...(raw as PricingRequest), tranches: fan(top), include: [] });
  if (!checked.ok) return checked;
  const problems: PricingProblem[] = [];
  const valuation = valuationOf(checked.request, problems);
  if (!valuation || problems.length > 0) return { ok: false, problems };
  const classes: SizedClass[] = [];
  let detachment = top;
  for (const target of targets) {
    const sized = place(valuation, target, detachment, step);
    classes.push(sized);
    if (!sized.ok) break;
    detachment = sized.attachment;
  }
  return { ok: true, classes, left: detachment };
}

/** Tranches whose strikes make the pool's laws accurate wherever a boundary may come to lie. */
function fan(top: number) {
  const strikes = Array.from({ length: LAW_STRIKES + 1 }, (_, i) => top * (i / LAW_STRIKES) ** 2);
  return strikes.slice(1).map((detachment, i) => ({ id: `fan ${i}`, attachment: strikes[i]!, detachment }));
}

function place(
  valuation: Valuation,
  { id, limits }: SizingTarget,
  detachment: number,
  step: number,
): SizedClass {
  const wanted = limitKinds.flatMap((kind) =>
    limits[kind] === undefined ? [] : [{ kind, most: limits[kind] }],
  );
  if (detachment <= step / 2) return { id, ok: false, reason: "noRoom", detachment };
  if (wanted.length === 0) return { id, ok: false, reason: "noLimit", detachment };
  const thinnest = Math.max(0, onStep(detachment - step, step));
  let attachment = 0;
  let binding: LimitKind | null = null;
  for (const { kind, most } of wanted) {
    const figure = (strike: number) => figureOf(valuation, kind, strike, detachment);
    const least = figure(thinnest);
    if (least === null) return { id, ok: false, reason: "unreadable", detachment };
    if (least > most) return { id, ok: false, reason: "tooTight", detachment, limit: kind, least };
    const lowest = lowestStrike(valuation, figure, most, thinnest, step);
    if (lowest > attachment) {
      attachment = lowest;
      binding = kind;
    }
  }
  const figures = Object.fromEntries(
    limitKinds.map((kind) => [kind, figureOf(valuation, kind, attachment, detachment)]),
  ) as Record<LimitKind, number | null>;
  return { id, ok: true, attachment, detachment, binding, figures };
}

/** The lowest multiple of the step from which on upwards the figure keeps within its limit. */
function lowestStrike(
  valuation: Valuation,
  figure: (strike: number) => number | null,
  most: number,
  thinnest: number,
  step: number,
): number {
  const keeps = (strike: number) => {
    const value = figure(strike);
    return value !== null && value <= most;
  };
  let [broken, kept] = valuation.base ? scanned(keeps, thinnest) : [0, thinnest];
  if (keeps(broken)) return broken;
  for (let i = 0; i < BISECTIONS && kept - broken > step / 8; i++) {
    const middle = (broken + kept) / 2;
    if (keeps(middle)) kept = middle;
    else broken = middle;
  }
  return Math.min(thinnest, onStep(kept, step));
}

/** The first stretch on the way down in which the limit is broken. */
function scanned(keeps: (strike: number) => boolean, thinnest: number): [number, number] {
  let kept = thinnest;
  for (let i = SCAN - 1; i >= 0; i--) {
    const strike = (thinnest * i) / SCAN;
    if (!keeps(strike)) return [strike, kept];
    kept = strike;
  }
  return [0, kept];
}

/** A class's figure; null where the base curve cannot be read. */
function figureOf(
  valuation: Valuation,
  kind: LimitKind,
  attachment: number,
  detachment: number,
): number | null {
  const { base, laws, dependence, times, portfolio } = valuation;
  if (base && !(base.curve && base.isUsable(attachment) && base.isUsable(detachment))) return null;
  if (kind === "hitProbability") return probabilityAbove(valuation, attachment);
  const last = portfolio.times.length - 1;
  if (kind === "expectedLoss")
    return amountBetween(laws, dependence, "loss", last, attachment, detachment) / (detachment - attachment);
  const profile = trancheProfile(laws, dependence, strikesOfTranche({ id: "", attachment, detachment }));
  return parSpread(contractLegs(times, profile.loss, profile.outstanding));
}

/** The multiple of the step at or above a strike. */
function onStep(strike: number, step: number): number {
  return Number((Math.ceil(strike / step - 1e-9) * step).toPrecision(12));
}
