import { priceOnServer } from "../compute/serverPool";
import type { Actor } from "../platform/accounts/actor";
import { type Problem, Refusal, refuse } from "../platform/errors";
import type { Ask } from "../platform/operation";
import { queries as pools } from "../pools/queries";
import type { PricingReport } from "../pricing/report";
import type { NameInput, PricingRequest } from "../pricing/request";
import { need } from "../workspaces/policy";
import { queries as workspaces } from "../workspaces/queries";
import type { MarketContent, QuotedMaturity, QuotedPool } from "./schema";

interface Quoted {
  readonly workspaceId: string;
  readonly pricingDate: string;
  readonly content: MarketContent;
}

/**
 * Solves the base curve of every quoted pool and maturity in threads of the server, before the market is saved: pricing a deal
 * between two maturities then needs no solving. A ladder that stops keeps what was solved below.
 * @throws Refusal with the problems of every quote at its path.
 */
export async function solveQuotes(
  { workspaceId, pricingDate, content }: Quoted,
  ask: Ask,
  actor: Actor,
): Promise<readonly QuotedPool[]> {
  if (!content.quotedPools?.length) return [];
  const { may, role } = await ask(workspaces.open, { workspaceId });
  need(may.edit, role, "change markets");
  const problems: Problem[] = [];
  const solved: QuotedPool[] = [];
  for (const [i, quoted] of content.quotedPools.entries()) {
    const at = `content.quotedPools.${i}`;
    const pool = await ask(pools.open, { workspaceId, poolId: quoted.poolId }).catch(() => null);
    if (!pool) throw refuse("invalid", "noPool", "Choose a pool of this workspace.", `${at}.poolId`);
    const maturities: QuotedMaturity[] = [];
    for (const [k, maturity] of quoted.maturities.entries()) {
      const answer = await priceOnServer(
        ladderRequest(pricingDate, content, pool.names, maturity),
        actor.userId,
      );
      if (answer.ok) {
        const { baseCorrelation } = JSON.parse(answer.report) as PricingReport;
        maturities.push({ ...maturity, solved: baseCorrelation?.nodes ?? [] });
      } else problems.push(...answer.problems.map((problem) => placed(problem, `${at}.maturities.${k}`)));
    }
    solved.push({ ...quoted, maturities });
  }
  if (problems.length > 0) throw new Refusal("invalid", problems);
  return solved;
}

/** The market's content with its quoted pools as solved. */
export function withQuotes(content: MarketContent, quotedPools: readonly QuotedPool[]): MarketContent {
  const { quotedPools: _, ...rest } = content;
  return quotedPools.length > 0 ? { ...rest, quotedPools: [...quotedPools] } : rest;
}

function ladderRequest(
  pricingDate: string,
  { discount, schedule }: MarketContent,
  pool: readonly NameInput[],
  { maturity, years, quotes }: QuotedMaturity,
): PricingRequest {
  return {
    format: 1,
    pricingDate,
    schedule:
      schedule.kind === "even"
        ? { kind: "even", years: years ?? 0, perYear: schedule.perYear }
        : { kind: "standard", maturity: maturity ?? "", holidays: schedule.holidays },
    discount,
    pool: [...pool],
    correlation: { kind: "base", quotes, interpolation: "linear", beyond: "flat", mapping: "none" },
    tranches: [],
  };
}

/** A problem of the ladder's request, at the market's own field. */
function placed(problem: Problem, at: string): Problem {
  const path = problem.path
    .replace(/^correlation\.quotes/, `${at}.quotes`)
    .replace(/^schedule\.(maturity|years)/, `${at}.$1`)
    .replace(/^(discount|schedule)/, "content.$1");
  return { ...problem, path };
}
