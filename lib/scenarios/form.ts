import type { Problem } from "../platform/errors";
import { scaled, typedNumber } from "../platform/typed";
import { noShock, type Shock } from "../pricing/shock";

/** A shock as typed: percent, basis points and points of a percent. */
export interface ShockForm {
  readonly wider: string;
  readonly shift: string;
  readonly correlation: string;
  readonly recovery: string;
  readonly sectors: readonly SectorText[];
  readonly defaults: "none" | "names" | "widest";
  readonly names: readonly string[];
  readonly count: string;
}

export interface SectorText {
  readonly key: string;
  readonly sector: string;
  readonly wider: string;
  readonly recovery: string;
}

/** A grid's axes as typed. */
export interface GridForm {
  readonly kind: "relative" | "absolute";
  readonly spreads: string;
  readonly correlations: string;
}

export type ShockReading =
  | { readonly ok: true; readonly shock: Shock }
  | { readonly ok: false; readonly problems: readonly Problem[] };

export const blankGrid: GridForm = {
  kind: "relative",
  spreads: "-50 -25 0 25 50 100",
  correlations: "-20 -10 0 10 20",
};

/** Reads a shock; an empty field moves nothing. */
export function readShock(form: ShockForm): ShockReading {
  const problems: Problem[] = [];
  const number = (text: string, by: number, path: string, what: string, least: number): number => {
    const value = typedNumber(signed(text));
    if (value === undefined) return 0;
    if (value === null) {
      problems.push({
        code: "number",
        path,
        value: text,
        message: `${what} must be a number (it is "${text}").`,
      });
      return 0;
    }
    if (value < least)
      problems.push({
        code: "low",
        path,
        value: text,
        message: `${what} must be ${least} or more (it is ${text}).`,
      });
    return scaled(value, by);
  };
  const wider = number(form.wider, 100, "wider", "How much wider spreads are", -100);
  const shift = number(form.shift, 10_000, "shift", "The spread shift", -10_000);
  const correlation = number(form.correlation, 100, "correlation", "The correlation shift", -100);
  const recovery = number(form.recovery, 100, "recovery", "The recovery shift", -100);
  const sectors = form.sectors.map((row, i) => ({
    sector: row.sector,
    scale: 1 + number(row.wider, 100, `sectors.${i}.wider`, `${row.sector}: how much wider`, -100),
    recovery: number(row.recovery, 100, `sectors.${i}.recovery`, `${row.sector}: the recovery shift`, -100),
  }));
  const count = form.defaults === "widest" ? number(form.count, 1, "count", "How many names default", 0) : 0;
  if (!Number.isInteger(count))
    problems.push({
      code: "whole",
      path: "count",
      message: "How many names default must be a whole number.",
    });
  if (problems.length > 0) return { ok: false, problems };
  const defaults =
    form.defaults === "widest"
      ? { kind: "widest" as const, count }
      : { kind: "names" as const, ids: form.defaults === "names" ? [...form.names] : [] };
  return {
    ok: true,
    shock: { scale: scaled(1 + wider, 1), shift, correlation, recovery, sectors, defaults },
  };
}

/** A shock as text. */
export function shockFormOf(shock: Shock): ShockForm {
  const { defaults } = shock;
  const isNames = defaults.kind === "names" && defaults.ids.length > 0;
  const isWidest = defaults.kind === "widest" && defaults.count > 0;
  return {
    wider: textFrom(shock.scale - 1, 100),
    shift: textFrom(shock.shift, 10_000),
    correlation: textFrom(shock.correlation, 100),
    recovery: textFrom(shock.recovery, 100),
    sectors: shock.sectors.map(({ sector, scale, recovery }) => ({
      key: sector,
      sector,
      wider: textFrom(scale - 1, 100),
      recovery: textFrom(recovery, 100),
    })),
    defaults: isNames ? "names" : isWidest ? "widest" : "none",
    names: defaults.kind === "names" ? defaults.ids : [],
    count: defaults.kind === "widest" ? String(defaults.count) : "3",
  };
}

export const blankShock: ShockForm = shockFormOf(noShock);

/** Reads one axis of a grid: numbers parted by blanks or semicolons; null where one is none. */
export function readSteps(text: string, by: number): number[] | null {
  const parts = text.split(/[\s;]+/).filter((part) => part !== "");
  const numbers = parts.map((part) => typedNumber(signed(part.replace(/,$/, ""))));
  if (numbers.some((value) => typeof value !== "number")) return null;
  return numbers.map((value) => scaled(value as number, by));
}

/** A shock in words, for a list of scenarios. */
export function shockWords(shock: Shock): string {
  const plus = (value: number, by: number, unit: string) =>
    `${value > 0 ? "+" : "−"}${textFrom(Math.abs(value), by)} ${unit}`;
  const { defaults } = shock;
  const words = [
    shock.scale !== 1 && `spreads ${plus(shock.scale - 1, 100, "%")}`,
    shock.shift !== 0 && `spreads ${plus(shock.shift, 10_000, "bp")}`,
    shock.correlation !== 0 && `correlation ${plus(shock.correlation, 100, "points")}`,
    shock.recovery !== 0 && `recovery ${plus(shock.recovery, 100, "points")}`,
    ...shock.sectors.map(({ sector, scale, recovery }) =>
      [
        sector,
        scale !== 1 && `spreads ${plus(scale - 1, 100, "%")}`,
        recovery !== 0 && `recovery ${plus(recovery, 100, "points")}`,
      ]
        .filter(Boolean)
        .join(" "),
    ),
    defaults.kind === "names" && defaults.ids.length > 0 && `default of ${defaults.ids.join(", ")}`,
    defaults.kind === "widest" && defaults.count > 0 && `default of the ${defaults.count} widest`,
  ].filter((part) => typeof part === "string");
  return words.length > 0 ? words.join("; ") : "nothing moves";
}

/** A true minus or a plus sign in front is as good as a hyphen or none. */
function signed(text: string): string {
  return text.trim().replace(/^[−–]/, "-").replace(/^\+/, "");
}

function textFrom(value: number, by: number): string {
  return value === 0 ? "" : String(Number((value * by).toPrecision(12)));
}
