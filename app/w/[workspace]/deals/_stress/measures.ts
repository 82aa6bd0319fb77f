import type { FigureUnit } from "@/app/_ui/figures";
import type { ShockedClass, ShockedFigures } from "@/lib/pricing/shockedFigures";

/** Which figure of a class a grid shows. */
export type Measure = "value" | "expectedLoss" | "parSpread";

export function measures(currency: string): { value: Measure; label: string; words: string }[] {
  return [
    { value: "value", label: "Value", words: currency },
    { value: "expectedLoss", label: "Expected loss", words: "% of class" },
    { value: "parSpread", label: "Par spread", words: "bp" },
  ];
}

export function unitOf(measure: Measure): FigureUnit {
  return { value: "money", expectedLoss: "percent", parSpread: "basisPoints" }[measure] as FigureUnit;
}

/** A class's figure after a shock, or how far it is from another's; null where there is none. */
export function figureIn(
  figures: ShockedFigures | undefined,
  id: string,
  measure: Measure,
  from?: ShockedFigures | undefined,
): number | null {
  const read = (of: ShockedFigures | undefined): number | null => {
    const found = of?.ok ? of.classes.find((row: ShockedClass) => row.id === id) : undefined;
    return found ? found[measure] : null;
  };
  const value = read(figures);
  if (from === undefined) return value;
  const start = read(from);
  return value === null || start === null ? null : value - start;
}
