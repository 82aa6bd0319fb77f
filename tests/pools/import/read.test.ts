import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { decodeText } from "@/lib/pools/import/decode";
import { readNames, readPool } from "@/lib/pools/import/read";
import { currencyOf } from "@/lib/pools/import/recognise";
import { rejectedCsv } from "@/lib/pools/import/rejected";
import { readTable, withCell } from "@/lib/pools/import/table";
import { poolNameProblems } from "@/lib/pricing/refusals";

const lines = (...rows: string[]) => rows.join("\r\n");

describe("reading a file of names", () => {
  it("reads the demo pool: 125 names with four spread tenors each, nothing to complain about", () => {
    const reading = readPool(readFileSync("seed/pool.csv", "utf8"));
    expect(reading.problems).toEqual([]);
    expect(reading.tableProblems).toEqual([]);
    expect(reading.names).toHaveLength(125);
    expect(reading.names[0]).toEqual({
      id: "LL001",
      name: "Brinewick Ferries",
      sector: "Transport",
      notional: 8_000_000,
      recovery: 0.3,
      credit: {
        kind: "spread",
        nodes: [
          { years: 1, spread: 0.0029 },
          { years: 3, spread: 0.00485 },
          { years: 5, spread: 0.00605 },
          { years: 7, spread: 0.0069 },
        ],
      },
    });
  });

  it("reads a semicolon file with decimal commas, thousands points, title lines, blank lines and a totals line", () => {
    const reading = readPool(
      lines(
        "Portfolio per 30.11.2026;;;;",
        "",
        "Kürzel;Emittent;Branche;Nominal (EUR);Erlösquote;CDS 5J (bp)",
        "A1;Ärmelwerk AG;Energie;1.250.000,50;40 %;85,5",
        ";;;;;",
        'A2;"Brückner; Söhne";Handel;750.000;35 %;120',
        "Summe;;;2.000.000,50;;",
      ),
    );
    expect(reading.tableProblems).toEqual([]);
    expect(reading.problems).toEqual([]);
    expect(reading.names).toEqual([
      {
        id: "A1",
        name: "Ärmelwerk AG",
        sector: "Energie",
        notional: 1_250_000.5,
        recovery: 0.4,
        credit: { kind: "spread", nodes: [{ years: 5, spread: 0.00855 }] },
      },
      {
        id: "A2",
        name: "Brückner; Söhne",
        sector: "Handel",
        notional: 750_000,
        recovery: 0.35,
        credit: { kind: "spread", nodes: [{ years: 5, spread: 0.012 }] },
      },
    ]);
    expect(reading.setAside).toMatchObject([{ line: 7, remark: null }]);
  });

  it("says so when the totals line is not the sum of the rows, and takes the rows all the same", () => {
    const reading = readPool(
      lines("id,notional,recovery,pd", "a,10,0.4,0.01", "b,20,0.4,0.01", "Total,31,,"),
    );
    expect(reading.names).toHaveLength(2);
    expect(reading.setAside[0]?.remark).toBe("It says 31, the rows above sum to 30.");
  });

  it("does not take a company whose name begins with Total for a totals line", () => {
    const reading = readPool(
      lines("name,notional,recovery,pd", "Aldermoor,10,0.4,0.01", "Totalwind Farms,20,0.4,0.01"),
    );
    expect(reading.names.map(({ id }) => id)).toEqual(["Aldermoor", "Totalwind Farms"]);
  });

  it("lists every problem of every row at once, by line, column, value and reason", () => {
    const reading = readPool(
      lines(
        "Id,Name,Notional,Recovery,Spread 5Y (bp)",
        "a,Aldermoor,0,40%,80",
        "b,Birchwick,10,120%,eighty",
        "b,Cinderholm,10,40%,",
        ",,10,40%,80",
        "d,Dunmarrow,10,40%,80",
      ),
    );
    expect(reading.problems.map(({ line, column, value, reason }) => [line, column, value, reason])).toEqual([
      [2, "Notional", "0", "must be above 0 and at most 1e15"],
      [3, "Recovery", "120%", "must be at least 0 % and below 100 %"],
      [3, "Spread 5Y (bp)", "eighty", "is not a number with a decimal point"],
      [4, "Id", "b", "is already the id of line 3"],
      [4, "Spread 5Y (bp)", "", "gives the name no credit input"],
      [5, "Name", "", "is empty: a row needs an id or a name"],
    ]);
    expect(reading.names.map(({ id }) => id)).toEqual(["d"]);
  });

  it("names what is missing when no column gives a notional, a recovery or a credit input", () => {
    expect(readPool("Id,Name\na,Aldermoor").tableProblems).toEqual([
      "No column is read as notional.",
      "No column is read as recovery.",
      "No column is read as a credit input: spread, default probability, hazard, or upfront with coupon.",
    ]);
    expect(readPool("hello\nworld").tableProblems[0]).toMatch(/^No header line was found/);
  });

  it.each([
    ["Yearly PD (%)", "1.5", { kind: "yearly", probability: 0.015 }],
    ["Hazard rate", "0.02", { kind: "hazard", rate: 0.02 }],
    ["Cumulative PD 3Y", "4.5%", { kind: "cumulative", nodes: [{ years: 3, probability: 0.045 }] }],
    ["PD 5Y", "4.5%", { kind: "cumulative", nodes: [{ years: 5, probability: 0.045 }] }],
    ["5Y CDS", "101.25", { kind: "spread", nodes: [{ years: 5, spread: 0.010125 }] }],
    ["7Y", "101.25", { kind: "spread", nodes: [{ years: 7, spread: 0.010125 }] }],
    ["6M spread bps", "30", { kind: "spread", nodes: [{ years: 0.5, spread: 0.003 }] }],
  ])("reads the column %s with %s", (header, cell, credit) => {
    expect(readPool(`issuer,amount,rec,${header}\nAldermoor,10,0.4,${cell}`).names[0]?.credit).toEqual(
      credit,
    );
  });

  it("reads an upfront with its coupon, and asks for the coupon where it is missing", () => {
    const header = "issuer\tamount\tLGD\tUpfront 5Y (%)\tCoupon (bp)";
    expect(readPool(`${header}\nAldermoor\t10\t60%\t(2.5)\t500`).names[0]).toMatchObject({
      recovery: 0.4,
      credit: { kind: "upfront", years: 5, upfront: -0.025, coupon: 0.05 },
    });
    expect(readPool(`${header}\nAldermoor\t10\t60%\t2.5\t`).problems[0]?.reason).toBe(
      "is missing: an upfront needs its coupon",
    );
  });

  it("refuses cumulative probabilities that fall, beside the later one", () => {
    const reading = readPool("id,notional,recovery,cum PD 1Y,cum PD 3Y\na,10,0.4,3%,2%");
    expect(reading.problems).toMatchObject([{ position: 4, reason: "must not be below that of 1 years" }]);
  });

  it("takes the line sep=; of a spreadsheet for what it is, and counts lines with it", () => {
    const reading = readPool("sep=;\nid;notional;recovery;pd\na;-1;0,4;0,01");
    expect(reading.problems).toMatchObject([{ line: 3, column: "notional" }]);
  });

  it("reads names in default by their status, whatever else stands in the row", () => {
    const reading = readPool("id,notional,recovery,status,5Y\na,10,0.3,defaulted,\nb,10,0.4,,100");
    expect(reading.names.map(({ credit }) => credit.kind)).toEqual(["defaulted", "spread"]);
  });

  it.each([
    ["Notional (USD)", "USD"],
    ["Nominal EUR m", "EUR"],
    ["Notional", null],
    ["Notional (ABC)", null],
  ])("finds the currency in the header %s: %s", (header, currency) => {
    expect(currencyOf(readPool(`id,${header},recovery,pd\na,1,0.4,0.01`).columns)).toBe(currency);
  });

  it("complains about a cell beyond the last header instead of dropping it", () => {
    const reading = readPool("name,notional,recovery,pd\nAldermoor, Ltd,10,0.4,0.01");
    expect(reading.problems.map(({ reason }) => reason)).toContain(
      "stands beyond the last header: a separator inside a text needs quotes",
    );
    expect(reading.names).toEqual([]);
  });

  it("says that a quotation mark was never closed", () => {
    const reading = readPool('name,notional,recovery,pd\n"Aldermoor,10,0.4,0.01\nBirchwick,10,0.4,0.01');
    expect(reading.tableProblems.join(" ")).toContain("quotation mark");
  });

  it("counts lines as the file does when a quoted cell holds a line break", () => {
    const reading = readPool('name,notional,recovery,pd\n"Alder\nmoor",10,0.4,0.01\nBirchwick,-1,0.4,0.01');
    expect(reading.problems).toMatchObject([{ line: 4 }]);
  });

  it("takes a cell mended in place, and gives the rejected rows with their reasons as CSV", () => {
    const table = readTable("id,notional,recovery,pd\na,10,1.4,0.01\nb,10,0.4,0.01")!;
    const columns = readNames(table).columns.map((column) => ({ ...column, unit: "plain" as const }));
    const reading = readNames(table, columns);
    expect(rejectedCsv(reading)).toBe(
      "\ufeffid,notional,recovery,pd,Reason\r\na,10,1.4,0.01,recovery must be at least 0 % and below 100 %\r\n",
    );
    expect(readNames(withCell(table, 2, 2, "0.4"), columns).problems).toEqual([]);
  });

  it("never lets through what the pricing request would refuse", () => {
    const reading = readPool(
      lines(
        "id,sector,notional,recovery,beta,1Y,5Y",
        "a,X,1,0,0.3,10bp,20bp",
        "b,X,1e15,99.9%,-0.99,0,0",
        "c,X,1e16,0,0.3,10,20",
        "d,X,1,1,1,10,20",
        "e,X,NaN,0,0.3,10,20",
        `${"f".repeat(201)},X,1,0,0.3,10,20`,
        `g,${"X".repeat(501)},1,0,0.3,10,20`,
      ),
    );
    expect(reading.names.map(({ id }) => id)).toEqual(["a", "b"]);
    expect(poolNameProblems(reading.names)).toEqual([]);
  });

  it("reads 10,000 rows with every check in under 3 seconds", () => {
    const rows = Array.from(
      { length: 10_000 },
      (_, i) => `N${i};Firma ${i};Energie;1.000.000,00;40,0;${50 + (i % 300)},5`,
    );
    const text = ["Id;Name;Branche;Nominal;Erlösquote;Spread 5J", ...rows].join("\n");
    const start = performance.now();
    expect(readPool(text).names).toHaveLength(10_000);
    expect(performance.now() - start).toBeLessThan(3_000);
  });
});

describe("decoding a file", () => {
  const text = "Erlösquote – 40 €";
  const utf16 = (isBig: boolean) => {
    const bytes = Buffer.from(`\ufeff${text}`, "utf16le");
    return new Uint8Array(isBig ? bytes.swap16() : bytes);
  };
  it.each([
    ["UTF-8", new TextEncoder().encode(text)],
    ["UTF-16 little-endian with its mark", utf16(false)],
    ["UTF-16 big-endian with its mark", utf16(true)],
    [
      "Windows-1252 (code page table of the WHATWG Encoding Standard: 0x96 is –, 0x80 is €)",
      Uint8Array.from([...text].map((c) => (c === "–" ? 0x96 : c === "€" ? 0x80 : c.charCodeAt(0)))),
    ],
  ])("reads %s", (_, bytes) => {
    expect(decodeText(bytes)).toBe(text);
  });
});
