import type { PricingProblem } from "../problem";
import { asArray, asObject, isNumber, type Loose } from "./loose";
import { orderProblems } from "./orderProblems";
import { poolProblems } from "./poolProblems";
import { NARROWEST_TRANCHE } from "./trancheProblems";
import { problem } from "./wording";

/** A correlation that contradicts itself, or asks of the pool or the law what they do not give. */
export function correlationProblems(request: Loose, raw: unknown): PricingProblem[] {
  const correlation = asObject(request.correlation);
  const pool = asArray(request.pool);
  const problems: PricingProblem[] = [];
  if (correlation.kind === "sector") {
    const { within, between } = correlation;
    if (isNumber(within) && isNumber(between) && between > within) {
      problems.push(
        problem(
          "correlation",
          ["correlation", "between"],
          raw,
          "must not be above the correlation within a sector",
        ),
      );
    }
    for (const [i, row] of pool.entries()) {
      const { sector } = asObject(row);
      if (sector === undefined || sector === "")
        problems.push(
          problem("missing", ["pool", String(i), "sector"], raw, "is missing: a sector correlation needs it"),
        );
    }
  }
  if (correlation.kind === "loadings") {
    for (const [i, row] of pool.entries()) {
      if (asObject(row).loading === undefined)
        problems.push(
          problem(
            "missing",
            ["pool", String(i), "loading"],
            raw,
            "is missing: a correlation by loadings needs it",
          ),
        );
    }
  }
  if (
    asObject(request.law).kind === "largePool" &&
    (correlation.kind === "loadings" || correlation.kind === "sector")
  ) {
    problems.push(
      problem(
        "law",
        ["law", "kind"],
        raw,
        "the large pool is one class of names: it needs a flat or a base correlation",
      ),
    );
  }
  if (correlation.kind === "base") problems.push(...baseProblems(correlation, raw));
  return problems;
}

function baseProblems(correlation: Loose, raw: unknown): PricingProblem[] {
  const problems = orderProblems(asArray(correlation.nodes), "strike", ["correlation", "nodes"], raw);
  for (const [i, node] of asArray(correlation.nodes).entries()) {
    if (asObject(node).strike === 0)
      problems.push(problem("range", ["correlation", "nodes", String(i), "strike"], raw, "must be above 0"));
  }
  const quotes = asArray(correlation.quotes);
  for (const [i, quote] of quotes.entries()) {
    const { attachment, detachment } = asObject(quote);
    const path = ["correlation", "quotes", String(i)];
    if (!isNumber(attachment) || !isNumber(detachment)) continue;
    if (detachment - attachment < NARROWEST_TRANCHE)
      problems.push(problem("strikes", path, raw, "must attach below where it detaches"));
    const before = asObject(quotes[i - 1]).detachment;
    const expected = i === 0 ? 0 : before;
    if (isNumber(expected) && Math.abs(attachment - expected) > 1e-12) {
      const words =
        attachment < expected
          ? "overlaps the quote below it"
          : "leaves a gap below it: quotes must follow each other from 0";
      problems.push(problem("quotes", [...path, "attachment"], raw, words));
    }
  }
  problems.push(
    ...poolProblems(asArray(asObject(correlation.index).pool), ["correlation", "index", "pool"], raw),
  );
  return problems;
}
