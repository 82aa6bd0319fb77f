import { describe, expect, test } from "vitest";
import { quotesText, readQuotes } from "@/lib/markets/quotesText";

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

  test("that do not read are told all at once, by line", () => {
    const { problems } = readQuotes("2031-12-20 0 3 500\nsoon 0 3 500 4\n2031-12-20 0 three 500 4", false);
    expect(problems).toEqual([
      "Line 1 has 4 cells, not the five that a quote has.",
      'Line 2: the maturity "soon" is not a date YYYY-MM-DD.',
      'Line 3: "three" is not a number.',
    ]);
  });

  test("of a market with even periods have years for a maturity", () => {
    expect(readQuotes("5 0 3 500 41.5", true).maturities[0]).toMatchObject({ maturity: null, years: 5 });
    expect(readQuotes("", true).problems).toEqual(["Give at least one quote."]);
  });
});
