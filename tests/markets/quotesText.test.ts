import { describe, expect, test } from "vitest";
import { quoteProblems } from "@/app/w/[workspace]/markets/_desk/quoteProblems";
import { quotesText, readQuotes, withCells } from "@/lib/markets/quotesText";

const pasted = "2031-12-20\t3\t7\t500\t5,25\r\n2031-12-20 0 3 500 41.5%\n\n2029-12-20;0;3;500;-1";

describe("quotes as pasted", () => {
  test("are read by line, with comma or point, tabs, blanks or semicolons, and set in order of attachment", () => {
    const { maturities, problems } = readQuotes(pasted, false);
    expect(problems).toEqual([]);
    expect(maturities).toEqual([
      {
        maturity: "2031-12-20",
        years: null,
        quotes: [
          { attachment: 0, detachment: 0.03, running: 0.05, upfront: 0.415 },
          { attachment: 0.03, detachment: 0.07, running: 0.05, upfront: 0.0525 },
        ],
      },
      {
        maturity: "2029-12-20",
        years: null,
        quotes: [{ attachment: 0, detachment: 0.03, running: 0.05, upfront: -0.01 }],
      },
    ]);
  });

  test("come back the same when they are written and read again", () => {
    const { maturities } = readQuotes(pasted, false);
    expect(readQuotes(quotesText(maturities), false).maturities).toEqual(maturities);
  });

  test("that do not read are told all at once, each at its line and cell", () => {
    const { problems } = readQuotes(
      "2031-12-20 0 3 500\nsoon 0 3 500 4\n\n2031-12-20\t0\tthree\t\t4\t9",
      false,
    );
    expect(problems).toEqual([
      { line: 0, cell: 4, message: "Line 1: a number is missing." },
      { line: 1, cell: 0, message: 'Line 2: the maturity "soon" is not a date YYYY-MM-DD.' },
      { line: 3, cell: 4, message: "Line 4 has 6 cells, not the five that a quote has." },
      { line: 3, cell: 2, message: 'Line 4: "three" is not a number.' },
      { line: 3, cell: 3, message: "Line 4: a number is missing." },
    ]);
  });

  test("know the line that each was typed in, whatever order they are read in", () => {
    expect(readQuotes(pasted, false).lines).toEqual([[1, 0], [3]]);
  });

  test("refused by the server are told at the line and cell they were typed in", () => {
    const told = { "content.quotedPools.0.maturities.0.quotes.1.upfront": "No." };
    expect(quoteProblems(pasted, false, told, "content.quotedPools.0")).toEqual([
      { line: 0, cell: 4, message: "Line 1: No." },
    ]);
  });

  test("pasted into the grid lie from the cell on, with new lines below and nothing past the last column", () => {
    expect(
      withCells("5\t0\t3\t500\t40", { line: 0, cell: 3 }, [
        ["100", "1", "no"],
        ["200", "2"],
      ]),
    ).toBe("5\t0\t3\t100\t1\n\t\t\t200\t2");
  });

  test("of a market with even periods have years for a maturity", () => {
    expect(readQuotes("5 0 3 500 41.5", true).maturities[0]).toMatchObject({ maturity: null, years: 5 });
    expect(readQuotes("", true).problems).toEqual([
      { line: 0, cell: 0, message: "Give at least one quote." },
    ]);
  });
});
