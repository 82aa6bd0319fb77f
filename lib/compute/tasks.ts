import { attribute } from "../pricing/attribution";
import {
  type MarketDriversAnswer,
  marketDrivers,
  type NameDriversAnswer,
  nameDrivers,
} from "../pricing/drivers";
import { type QuickCache, quickCache } from "../pricing/quickCache";
import type { PricingRequest } from "../pricing/request";
import type { Shock } from "../pricing/shock";
import { type ShockedFigures, shockedFigures } from "../pricing/shockedFigures";
import { type SizingAnswer, type SizingInput, sizeClasses } from "../pricing/sizing";
import { answer } from "./answer";

/** What a worker can be asked for, in the browser or on the server: each a pure function of its input. */
export const tasks = {
  price: answer,
  /** Every class of a request after a shock. */
  shocked: ({ request, shock }: { readonly request: unknown; readonly shock: Shock }): ShockedFigures =>
    shockedFigures(request, shock),
  /** What a request's figures can be read from while its boundaries and correlation are dragged. */
  quickCache: (request: unknown): QuickCache | null => quickCache(request),
  /** What moves every class, the market's inputs first, then name by name. */
  marketDrivers: (request: unknown): MarketDriversAnswer => marketDrivers(request),
  nameDrivers: (input: {
    readonly request: unknown;
    readonly places: readonly number[];
  }): NameDriversAnswer => nameDrivers(input.request, input.places),
  /** Boundaries from targets. */
  sizeClasses: (input: SizingInput): SizingAnswer => sizeClasses(input),
  attribute: ({ before, after }: { before: PricingRequest; after: PricingRequest }) =>
    attribute(before, after),
};

export type TaskKind = keyof typeof tasks;
export type TaskInput<Kind extends TaskKind> = Parameters<(typeof tasks)[Kind]>[0];
export type TaskOutput<Kind extends TaskKind> = ReturnType<(typeof tasks)[Kind]>;

/** A task as sent to a worker. */
export interface TaskMessage {
  readonly id: number;
  readonly kind: TaskKind;
  readonly input: unknown;
}

/** Its answer: the output, or what went wrong in the engine itself (never a refusal: those are outputs). */
export type TaskAnswer =
  | { readonly id: number; readonly ok: true; readonly output: unknown }
  | { readonly id: number; readonly ok: false; readonly message: string };
