import { exp, log } from "@/lib/quant/maths/elementary";
import { normalQuantile } from "@/lib/quant/maths/normal";
import { largePoolQuantile, largePoolSquare } from "@/lib/quant/portfolio/largePool";
import { type Check, input, inputs, type Published } from "./check";

function largePool(probability: number, correlation: number) {
  return { threshold: normalQuantile(probability), lossGivenDefault: 1, correlation };
}

/** Worst-case default rate at 99.9 %: the quantile of the large pool with nothing recovered. */
function worstCase(probability: number, correlation: number): number {
  return largePoolQuantile(largePool(probability, correlation), 0.999);
}

/** (1 − e^−kPD)/(1 − e^−k): the weight of the supervisory correlation functions. */
function decay(probability: number, speed: number): number {
  return (1 - exp(-speed * probability)) / (1 - exp(-speed));
}

/** Supervisory asset correlations (Basel II, paragraphs 272, 273, 328–330); sales in millions. */
function supervisoryCorrelation(kind: string, probability: number, sales: number): number {
  if (kind === "mort") return 0.15;
  if (kind === "qrre") return 0.04;
  const [low, high, speed] = kind === "corp" ? [0.12, 0.24, 50] : [0.03, 0.16, 35];
  const weight = decay(probability, speed!);
  const size = kind === "corp" ? 0.04 * (1 - (Math.min(Math.max(sales, 5), 50) - 5) / 45) : 0;
  return low! * weight + high! * (1 - weight) - size;
}

/** Risk weight in percent: 12.5 · LGD · (worst case − PD), for firms with the maturity adjustment. */
function riskWeight(column: string, probability: number, maturity: number): number {
  const [, kind, loss, sales] = /^(\w+) LGD([\d.]+) S(\d+)$/.exec(column)!;
  const slope = (0.11852 - 0.05478 * log(probability)) ** 2;
  const adjustment = kind === "corp" ? (1 + (maturity - 2.5) * slope) / (1 - 1.5 * slope) : 1;
  const correlation = supervisoryCorrelation(kind!, probability, Number(sales));
  return 1250 * Number(loss) * (worstCase(probability, correlation) - probability) * adjustment;
}

/** Vasicek's table counts standard deviations: (L_α − p)/s. */
function standardised(entry: Published): number[] {
  const probability = input(entry, "p");
  const pool = largePool(probability, input(entry, "rho"));
  const deviation = Math.sqrt(largePoolSquare(pool, 0, 1) - probability * probability);
  return inputs(entry, "alpha").map((level) => (largePoolQuantile(pool, level) - probability) / deviation);
}

/** Supervisory formula for securitisations: the mean of e^(−x/(p K_A)) over what the tranche holds beyond K_A. */
function securitisationWeight(entry: Published): number {
  const own = input(entry, "KA");
  const [attachment, detachment] = [input(entry, "A"), input(entry, "D")];
  const rate = -1 / (input(entry, "p") * own);
  const [upper, lower] = [detachment - own, Math.max(attachment - own, 0)];
  const above = (exp(rate * upper) - exp(rate * lower)) / (rate * (upper - lower));
  const covered = (own - attachment) / (detachment - attachment);
  return 100 * (covered * 12.5 + (1 - covered) * 12.5 * above);
}

/** The large pool: quantiles and the supervisory formulas that rest on it. */
export const largePoolChecks: readonly Check[] = [
  {
    of: /^WCDR-rho/,
    compute: (entry) =>
      inputs(entry, "PD").map((probability) => 100 * worstCase(probability, input(entry, "rho"))),
  },
  { of: /^WCDR-ex$/, compute: (entry) => [worstCase(input(entry, "PD"), input(entry, "rho"))] },
  { of: /^VAS02-/, compute: standardised },
  {
    of: /^B2A5-/,
    compute: (entry) =>
      (entry.inputs.columns as string[]).map((column) =>
        riskWeight(column, input(entry, "PD"), input(entry, "M")),
      ),
  },
  {
    of: /^SECSA-KA$/,
    compute: (entry) => {
      const [capital, delinquent, unknown] = [
        input(entry, "KSA"),
        input(entry, "W"),
        input(entry, "unknown"),
      ];
      const own = (1 - delinquent) * capital + 0.5 * delinquent;
      return [own, (1 - unknown) * own + unknown];
    },
  },
  { of: /^SECSA-RW$/, compute: (entry) => [securitisationWeight(entry)] },
];
