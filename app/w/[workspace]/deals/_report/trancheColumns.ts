import type { FigureUnit } from "@/app/_ui/figures";
import type { FigureColumn } from "@/app/_ui/table/figureColumns";
import type { TrancheReport } from "@/lib/pricing/report";

/** What losses and legs of a class are measured in. */
export type LossesIn = "class" | "pool" | "money";

export const lossesIn: readonly { value: LossesIn; label: string }[] = [
  { value: "class", label: "Losses in % of the class" },
  { value: "pool", label: "Losses in % of the pool" },
  { value: "money", label: "Losses in money" },
];

/** Keys of the columns that a reader has to ask for. */
export const hiddenTrancheColumns = [
  "lossGivenHit",
  "standardDeviation",
  "protectionLeg",
  "defaultsToExhaust",
  "notional",
  "rhoAttachment",
  "rhoDetachment",
  ...[0.95, 0.99, 0.999].flatMap((level) => [`quantile ${level}`, `shortfall ${level}`]),
];

type Column = FigureColumn<TrancheReport>;

/** The figures of a class, as columns. */
export function trancheColumns(currency: string, measure: LossesIn): Column[] {
  const plain = (
    key: keyof TrancheReport & string,
    header: string,
    unit: FigureUnit,
    unitWords?: string,
  ): Column => ({
    key,
    header,
    unit,
    ...(unitWords ? { unitWords } : {}),
    value: (row) => row[key] as number | null,
  });
  const words = { class: "% of class", pool: "% of pool", money: currency }[measure];
  const loss = (key: string, header: string, of: (row: TrancheReport) => number | null): Column => ({
    key,
    header,
    unit: measure === "money" ? "money" : "percent",
    unitWords: words,
    value(row) {
      const value = of(row);
      if (value === null) return null;
      if (measure === "money") return value * row.notional;
      return measure === "pool" ? value * (row.detachment - row.attachment) : value;
    },
  });
  const atLevel = (level: number): Column[] => [
    loss(`quantile ${level}`, `Loss at ${level * 100} %`, (row) => quantile(row, level)?.loss ?? null),
    loss(
      `shortfall ${level}`,
      `Shortfall at ${level * 100} %`,
      (row) => quantile(row, level)?.shortfall ?? null,
    ),
  ];
  return [
    plain("notional", "Notional", "money", currency),
    loss("expectedLoss", "Expected loss", (row) => row.expectedLoss),
    plain("hitProbability", "Hit", "percent", "%"),
    plain("exhaustionProbability", "Exhaustion", "percent", "%"),
    plain("parSpread", "Par spread", "basisPoints", "bp"),
    plain("upfrontAtRunning", "Upfront at coupon", "percent", "%"),
    plain("sellerValue", "Value to seller", "money", currency),
    plain("annuity", "Annuity", "years", "years"),
    plain("leverage", "Leverage", "plain"),
    plain("defaultsToAttach", "Defaults to attach", "plain"),
    plain("defaultsToExhaust", "Defaults to exhaust", "plain"),
    loss("lossGivenHit", "Loss given a hit", (row) => row.lossGivenHit),
    loss("standardDeviation", "Std. deviation", (row) => row.standardDeviation),
    loss("protectionLeg", "Protection leg", (row) => row.protectionLeg),
    {
      key: "rhoAttachment",
      header: "Correlation at attachment",
      unit: "percent",
      unitWords: "%",
      value: (row) => row.correlation.attachment,
    },
    {
      key: "rhoDetachment",
      header: "Correlation at detachment",
      unit: "percent",
      unitWords: "%",
      value: (row) => row.correlation.detachment,
    },
    ...[0.95, 0.99, 0.999].flatMap(atLevel),
  ];
}

function quantile({ quantiles }: TrancheReport, level: number) {
  return quantiles.find((row) => Math.abs(row.level - level) < 1e-9);
}
