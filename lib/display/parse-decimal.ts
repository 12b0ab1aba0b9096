const SPACES = /[\s\u00a0\u2007\u2009\u202f_]/g;
const PLAIN = /^[+-]?(\d+(\.\d*)?|\.\d+)$/;

/** Whether a text is digits grouped in threes by one mark, as "1.234.567". */
const grouped = (text: string, mark: string) => new RegExp(`^[+-]?\\d{1,3}(\\${mark}\\d{3})+$`).test(text);

/**
 * A number as a person types it: spaces anywhere, decimal point or comma, a true minus sign, the unit pasted
 * along when it is named. One mark alone is the decimal mark ("1,234" is 1.234); of two kinds the last one is the
 * decimal mark and the other has to group in threes. Null for anything else; empty text gives null too.
 *
 * @example
 * parseDecimal(" 84,5 kg", "kg"); // 84.5
 * @example
 * parseDecimal("1 234,5"); // 1234.5
 * @example
 * parseDecimal("12abc"); // null
 */
export function parseDecimal(text: string, unit = ""): number | null {
  let rest = text.replace(SPACES, "").replaceAll("\u2212", "-");
  const suffix = unit.replace(SPACES, "");
  if (suffix !== "" && rest.toLowerCase().endsWith(suffix.toLowerCase())) {
    rest = rest.slice(0, rest.length - suffix.length);
  }
  const plain = withPoint(rest);
  if (plain === null || !PLAIN.test(plain)) return null;
  const value = Number(plain);
  return Number.isFinite(value) ? value : null;
}

function withPoint(text: string): string | null {
  const commas = text.split(",").length - 1;
  const points = text.split(".").length - 1;
  if (commas === 0) return points <= 1 ? text : grouped(text, ".") ? text.replaceAll(".", "") : null;
  if (points === 0) {
    if (commas === 1) return text.replace(",", ".");
    return grouped(text, ",") ? text.replaceAll(",", "") : null;
  }
  const [decimal, group] = text.lastIndexOf(",") > text.lastIndexOf(".") ? [",", "."] : [".", ","];
  const [whole = "", fraction = "", ...more] = text.split(decimal);
  if (more.length > 0 || !grouped(whole, group)) return null;
  return `${whole.replaceAll(group, "")}.${fraction}`;
}
