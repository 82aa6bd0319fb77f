import { z } from "zod";

const number = z.number();
const nullable = z.number().nullable();

export const warningSchema = z.strictObject({ code: z.string(), message: z.string(), subject: z.string() });

export const trancheReportSchema = z.strictObject({
  id: z.string(),
  attachment: number,
  detachment: number,
  notional: number,
  correlation: z.strictObject({ attachment: nullable, detachment: nullable }),
  expectedLoss: nullable,
  hitProbability: nullable,
  exhaustionProbability: nullable,
  lossGivenHit: nullable,
  standardDeviation: nullable,
  leverage: nullable,
  defaultsToAttach: nullable,
  defaultsToExhaust: nullable,
  quantiles: z.array(z.strictObject({ level: number, loss: number, shortfall: number })),
  protectionLeg: nullable,
  annuity: nullable,
  parSpread: nullable,
  upfrontAtRunning: nullable,
  sellerValue: nullable,
  impliedCorrelation: z
    .strictObject({ solutions: z.array(number), attainable: z.tuple([number, number]) })
    .optional(),
});

export const contractReportSchema = z.strictObject({
  n: number,
  probability: number,
  protectionLeg: number,
  annuity: number,
  parSpread: nullable,
});

const arbitrageSchema = z.strictObject({
  from: number,
  to: number,
  kind: z.enum(["decreasing", "slope", "convex"]),
  size: number,
});

export const sensitivityReportSchema = z.strictObject({
  spread01: nullable,
  recovery01: nullable,
  correlation01: nullable,
  rate01: nullable,
  carry1d: nullable,
  byName: z.array(z.strictObject({ id: z.string(), spread01: nullable, jumpToDefault: nullable })),
});

/** The pricing report: the one source of its types. Units are decimals and years; money in the deal's currency. */
export const reportSchema = z.strictObject({
  format: z.literal(1),
  engine: z.strictObject({ name: z.string(), version: z.string() }),
  requestHash: z.string(),
  warnings: z.array(warningSchema),
  numericalError: number,
  pool: z.strictObject({
    names: number,
    notional: number,
    expectedLoss: number,
    defaultsExpected: number,
    protectionLeg: number,
    annuity: number,
    parSpread: nullable,
    realisedLoss: number,
    unit: nullable,
  }),
  tranches: z.array(trancheReportSchema),
  nthToDefault: z.array(contractReportSchema),
  baseCorrelation: z
    .strictObject({
      nodes: z.array(z.strictObject({ strike: number, rho: number })),
      stopped: z
        .strictObject({ strike: number, reason: z.string(), attainable: z.tuple([number, number]) })
        .optional(),
      arbitrage: z.array(arbitrageSchema),
    })
    .optional(),
  lossLaw: z.strictObject({ unit: nullable, probabilities: z.array(number) }).optional(),
  timeline: z
    .array(z.strictObject({ time: number, poolExpectedLoss: number, trancheExpectedLoss: z.array(nullable) }))
    .optional(),
  sensitivities: z.array(sensitivityReportSchema).optional(),
  audit: z
    .strictObject({
      method: z.string(),
      figures: z.array(
        z.strictObject({
          path: z.string(),
          value: number,
          audited: number,
          difference: number,
          standardError: number.optional(),
        }),
      ),
    })
    .optional(),
  pairs: z
    .strictObject({
      ids: z.array(z.string()),
      jointDefault: z.array(z.array(number)),
      eventCorrelation: z.array(z.array(nullable)),
    })
    .optional(),
});

export type PricingReport = z.infer<typeof reportSchema>;
export type TrancheReport = z.infer<typeof trancheReportSchema>;
export type ContractReport = z.infer<typeof contractReportSchema>;
export type SensitivityReport = z.infer<typeof sensitivityReportSchema>;
export type ReportWarning = z.infer<typeof warningSchema>;
