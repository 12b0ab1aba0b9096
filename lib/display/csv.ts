export type CsvCell = string | number | null;

const PLAIN_NUMBER = /^[+-]?(\d+(\.\d+)?|\.\d+)([eE][+-]?\d+)?$/;
/** A spreadsheet may take a cell that starts so for a formula, also behind blanks. */
const FORMULA_START = /^[\s\u00a0\ufeff]*[=+\-@\t\r\uff1d\uff0b\uff0d\uff20]/;

function csvCell(cell: CsvCell): string {
  if (cell === null) return "";
  if (typeof cell === "number") return Number.isFinite(cell) ? String(cell) : "";
  const startsBare = FORMULA_START.test(cell) || /^[\t\r\n]/.test(cell);
  const guarded = startsBare && !PLAIN_NUMBER.test(cell) ? `'${cell}` : cell;
  return /[",\r\n;\t]|^\s|\s$/.test(guarded) ? `"${guarded.replaceAll('"', '""')}"` : guarded;
}

/**
 * A table as CSV text: RFC 4180 quoting, CRLF after every line, UTF-8 byte order mark in front (spreadsheets
 * read accents by it), decimal point. A text that a spreadsheet would run as a formula gets a leading apostrophe
 * unless it is a plain number. Missing numbers (null, NaN) are empty cells, never 0.
 * Source: RFC 4180 (2005), section 2; OWASP, CSV Injection.
 *
 * @example
 * csvText([["Best 10 s, kn"], [19.4]]); // "\ufeff\"Best 10 s, kn\"\r\n19.4\r\n"
 */
export function csvText(rows: readonly (readonly CsvCell[])[]): string {
  return `\ufeff${rows.map((row) => `${row.map(csvCell).join(",")}\r\n`).join("")}`;
}
