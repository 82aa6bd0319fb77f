import { type NumberReader, scaled, textOf, typedNumber } from "../platform/typed";
import type { DealCorrelation } from "./schema";

/** The choice of correlation as typed. Every kind keeps its own text, so that changing one's mind loses nothing. */
export interface CorrelationText {
  /** "stored": a correlation that only the programming interface can give; it is kept as it is. */
  readonly kind: "flat" | "loadings" | "sector" | "base" | "market" | "stored";
  readonly within: string;
  readonly between: string;
  /** Base curve nodes: strike and correlation in percent, a pair a line. */
  readonly nodes: string;
  readonly quotedPool: string;
  readonly interpolation: "linear" | "monotone";
  readonly beyond: "flat" | "linear";
  readonly mapping: "none" | "moneyness" | "lossShare" | "probability";
}

export const blankCorrelation: CorrelationText = {
  kind: "flat",
  within: "",
  between: "",
  nodes: "",
  quotedPool: "",
  interpolation: "linear",
  beyond: "flat",
  mapping: "none",
};

const AT = "content.correlation";

/** A stored correlation as text. */
export function correlationText(correlation: DealCorrelation): CorrelationText {
  switch (correlation.kind) {
    case "flat":
    case "loadings":
      return { ...blankCorrelation, kind: correlation.kind };
    case "sector":
      return {
        ...blankCorrelation,
        kind: "sector",
        within: textOf(correlation.within, 100),
        between: textOf(correlation.between, 100),
      };
    case "market": {
      const { kind: _, ...choice } = correlation;
      return { ...blankCorrelation, ...choice, kind: "market" };
    }
    case "base": {
      if (!("nodes" in correlation) || correlation.index) return { ...blankCorrelation, kind: "stored" };
      const { interpolation, beyond, mapping, nodes } = correlation;
      const lines = nodes.map(({ strike, rho }) => `${textOf(strike, 100)}\t${textOf(rho, 100)}`);
      return { ...blankCorrelation, kind: "base", interpolation, beyond, mapping, nodes: lines.join("\n") };
    }
  }
}

/** Reads the choice; problems go to the reader. `stored` is what the deal has now. */
export function readCorrelation(
  text: CorrelationText,
  rho: string,
  stored: DealCorrelation | null,
  numbers: NumberReader,
): DealCorrelation {
  const { interpolation, beyond, mapping } = text;
  switch (text.kind) {
    case "flat":
      return { kind: "flat", rho: numbers.read(rho, 100, `${AT}.rho`, "The correlation", true) ?? 0 };
    case "loadings":
      return { kind: "loadings" };
    case "sector":
      return {
        kind: "sector",
        within: numbers.read(text.within, 100, `${AT}.within`, "The correlation within a sector", true) ?? 0,
        between:
          numbers.read(text.between, 100, `${AT}.between`, "The correlation between sectors", true) ?? 0,
      };
    case "market":
      if (text.quotedPool === "")
        numbers.problems.push({
          code: "missing",
          path: `${AT}.quotedPool`,
          message: "Choose a quoted pool of the market; a market gets them on its own page.",
        });
      return { kind: "market", quotedPool: text.quotedPool || "none", interpolation, beyond, mapping };
    case "base":
      return { kind: "base", nodes: readNodes(text.nodes, numbers), interpolation, beyond, mapping };
    case "stored":
      return stored ?? { kind: "flat", rho: 0 };
  }
}

function readNodes(text: string, numbers: NumberReader): { strike: number; rho: number }[] {
  const path = `${AT}.nodes`;
  const lines = text.split(/\r?\n/).filter((line) => line.trim() !== "");
  if (lines.length === 0)
    numbers.problems.push({ code: "missing", path, message: "Give the base curve at least one strike." });
  return lines.flatMap((line, i) => {
    const cells = line
      .trim()
      .split(/[\t;]|\s+/)
      .filter((cell) => cell !== "" && cell !== "%");
    const [strike, rho] = cells.map(typedNumber);
    if (cells.length === 2 && typeof strike === "number" && typeof rho === "number")
      return [{ strike: scaled(strike, 100), rho: scaled(rho, 100) }];
    numbers.problems.push({
      code: "number",
      path,
      value: line,
      message: `Line ${i + 1} of the base curve ("${line.trim()}") is not a strike and a correlation in percent.`,
    });
    return [];
  });
}
