/** Java and JavaScript print a number close to zero with a negative exponent; nothing else does in a track. */
const NEAR_ZERO = /^[+-]?\d(\.\d+)?[eE]-\d{1,2}$/;

/** Every integer of this many digits is an exact double. Source: IEEE 754-2019, binary64. */
const EXACT_DIGITS = 15;
const POWERS = Array.from({ length: EXACT_DIGITS + 1 }, (_, power) => 10 ** power);

/**
 * An xsd:decimal as a number, NaN when it is not one.
 *
 * Domain: surrounding white space, a leading plus, a missing digit before or after the point are allowed;
 * NaN, INF, commas and the empty text are not. One thing beyond the standard: a single digit with a negative
 * exponent ("9.1E-4"), because programs print positions near the equator or Greenwich that way.
 * Errors: none. Source: W3C XML Schema Part 2: Datatypes (2nd ed., 2004), 3.2.3.
 *
 * @example
 * parseDecimal("+48.5"); // 48.5
 */
export function parseDecimal(text: string): number {
  let at = 0;
  let end = text.length;
  while (at < end && text.charCodeAt(at) <= 32) at++;
  while (end > at && text.charCodeAt(end - 1) <= 32) end--;
  const start = at;
  const sign = text.charCodeAt(at);
  if (sign === 43 || sign === 45) at++;
  let digits = 0;
  let decimals = -1;
  let whole = 0;
  for (; at < end; at++) {
    const code = text.charCodeAt(at);
    if (code >= 48 && code <= 57) {
      whole = whole * 10 + (code - 48);
      digits++;
      if (decimals >= 0) decimals++;
    } else if (code === 46 && decimals < 0) decimals = 0;
    else break;
  }
  if (at < end || digits === 0) {
    const trimmed = text.slice(start, end);
    return NEAR_ZERO.test(trimmed) ? Number(trimmed) : Number.NaN;
  }
  // Two exact numbers below 2^53 and 10^22 divide to the nearest double: the same as the full conversion.
  if (digits > EXACT_DIGITS) return Number(text);
  const size = decimals > 0 ? whole / (POWERS[decimals] ?? Number.NaN) : whole;
  return sign === 45 ? -size : size;
}
