import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { csvText, type CsvCell } from "./csv";

const line = (cell: CsvCell) => csvText([[cell]]).slice(1, -2);

/** A reader of RFC 4180 written from its grammar, so that the writer is not checked by itself. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let [row, cell, quoted]: [string[], string, boolean] = [[], "", false];
  for (let i = 0; i < text.length; i += 1) {
    const c = text.charAt(i);
    if (quoted) {
      if (c !== '"') cell += c;
      else if (text.charAt(i + 1) === '"') {
        cell += c;
        i += 1;
      } else quoted = false;
    } else if (c === '"' && cell === "") quoted = true;
    else if (c === ",") {
      row.push(cell);
      cell = "";
    } else if (c === "\r" && text.charAt(i + 1) === "\n") {
      rows.push([...row, cell]);
      [row, cell] = [[], ""];
      i += 1;
    } else cell += c;
  }
  return rows;
}

describe("CSV (RFC 4180; OWASP, CSV Injection)", () => {
  it("starts with the byte order mark and ends every line with CRLF", () => {
    expect(
      csvText([
        ["a", 1],
        ["b", null],
      ]),
    ).toBe("\ufeffa,1\r\nb,\r\n");
  });

  it.each<[CsvCell, string]>([
    ["plain", "plain"],
    ["a,b", '"a,b"'],
    ['say "go"', '"say ""go"""'],
    ["two\r\nlines", '"two\r\nlines"'],
    [" led by a space", '" led by a space"'],
    ["Jammerbugt Ø", "Jammerbugt Ø"],
    ["=1+1", "'=1+1"],
    ["+SUM(A1)", "'+SUM(A1)"],
    ["-cmd", "'-cmd"],
    ["@A1", "'@A1"],
    ["\t=1", '"\'\t=1"'],
    ["\r=1", '"\'\r=1"'],
    ["  =1", "'  =1"],
    ["\n@A1", '"\'\n@A1"'],
    ["\uff1d1+1", "'\uff1d1+1"],
    ['=HYPERLINK("x")', '"\'=HYPERLINK(""x"")"'],
    ["-5.2", "-5.2"],
    ["+3", "+3"],
    ["-1e3", "-1e3"],
    [-5.2, "-5.2"],
    [0, "0"],
    [NaN, ""],
    [Infinity, ""],
    [null, ""],
    ["", ""],
  ])("writes %j as %j", (cell, expected) => {
    expect(line(cell)).toBe(expected);
  });

  it("gives every text back through a reader, guarded or not", () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(fc.string({ unit: "binary" }), { minLength: 2, maxLength: 4 }), { minLength: 1 }),
        (rows) => {
          const back = readCsv(csvText(rows).slice(1));
          expect(back.map((row) => row.map((cell) => cell.replace(/^'/, "")))).toEqual(
            rows.map((row) => row.map((cell) => cell.replace(/^'/, ""))),
          );
        },
      ),
      { seed: 2026 },
    );
  });
});
