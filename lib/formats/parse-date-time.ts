const LENGTH_MAX = 64;
const DAY_MS = 86_400_000;
const LONG_FORM = /^(-?\d{5,9}|-\d{4})-(\d\d)-(\d\d)(T.*)$/;
const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

/** Two digits at a place, or NaN. */
function pair(text: string, at: number): number {
  const tens = text.charCodeAt(at) - 48;
  const ones = text.charCodeAt(at + 1) - 48;
  return tens >= 0 && tens <= 9 && ones >= 0 && ones <= 9 ? tens * 10 + ones : Number.NaN;
}

function isLeap(year: number): boolean {
  return year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);
}

/** Days from 1970-01-01 in the proleptic Gregorian calendar; NaN when there is no such day. */
function epochDays(year: number, month: number, day: number): number {
  const length = (MONTH_DAYS[month - 1] ?? Number.NaN) + (month === 2 && isLeap(year) ? 1 : 0);
  if (!(day >= 1 && day <= length)) return Number.NaN;
  const shifted = month > 2 ? year : year - 1;
  const era = Math.floor(shifted / 400);
  const yearOfEra = shifted - era * 400;
  const dayOfYear = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear;
  return era * 146_097 + dayOfEra - 719_468;
}

/** Offset from UTC in milliseconds for "", "Z", "+hh:mm", "-hh:mm" from `at` to the end; NaN for anything else. */
function zoneMs(text: string, at: number): number {
  if (at === text.length) return 0;
  const sign = text.charCodeAt(at);
  if (sign === 90) return at + 1 === text.length ? 0 : Number.NaN;
  if ((sign !== 43 && sign !== 45) || at + 6 !== text.length || text.charCodeAt(at + 3) !== 58) {
    return Number.NaN;
  }
  const hours = pair(text, at + 1);
  const minutes = pair(text, at + 4);
  if (!(minutes <= 59) || !(hours < 14 || (hours === 14 && minutes === 0))) return Number.NaN;
  return (sign === 43 ? 1 : -1) * (hours * 60 + minutes) * 60_000;
}

/** Milliseconds since midnight minus the zone for "Thh:mm:ss(.fraction)(zone)" from `at`; NaN when broken. */
function clockMs(text: string, at: number): number {
  if (text.charCodeAt(at) !== 84 || text.charCodeAt(at + 3) !== 58 || text.charCodeAt(at + 6) !== 58) {
    return Number.NaN;
  }
  const hours = pair(text, at + 1);
  const minutes = pair(text, at + 4);
  const seconds = pair(text, at + 7);
  let end = at + 9;
  let fraction = 0;
  if (text.charCodeAt(end) === 46) {
    let scale = 100;
    let digit = text.charCodeAt(++end) - 48;
    if (!(digit >= 0 && digit <= 9)) return Number.NaN;
    for (; digit >= 0 && digit <= 9; digit = text.charCodeAt(++end) - 48) {
      fraction += digit * scale;
      scale /= 10;
    }
  }
  if (!(minutes <= 59 && seconds <= 59)) return Number.NaN;
  if (!(hours <= 23 || (hours === 24 && minutes === 0 && seconds === 0 && fraction === 0))) return Number.NaN;
  return hours * 3_600_000 + minutes * 60_000 + seconds * 1000 + fraction - zoneMs(text, end);
}

/**
 * An xsd:dateTime as UTC epoch milliseconds, fractions of a millisecond kept; NaN when it is not one.
 *
 * Domain: surrounding white space is allowed; 24:00:00 is the next day; a leap second (seconds 60), a zone
 * beyond 14:00 and everything looser than the standard are NaN. A time without a zone is read as UTC, which
 * is what GPX 1.1 says its times are (see `hasZone`).
 * Errors: none. Source: W3C XML Schema Part 2: Datatypes (2nd ed., 2004), 3.2.7; day count: Hinnant (2013),
 * days_from_civil.
 *
 * @example
 * parseDateTime("2024-06-01T14:00:00+02:00"); // 1717243200000
 */
export function parseDateTime(raw: string): number {
  const text = raw.charCodeAt(0) > 32 && raw.charCodeAt(raw.length - 1) > 32 ? raw : raw.trim();
  if (text.charCodeAt(4) === 45 && text.charCodeAt(7) === 45 && text.charCodeAt(0) !== 45) {
    const year = pair(text, 0) * 100 + pair(text, 2);
    if (year === 0) return Number.NaN;
    return epochDays(year, pair(text, 5), pair(text, 8)) * DAY_MS + clockMs(text, 10);
  }
  const long = text.length > LENGTH_MAX ? null : LONG_FORM.exec(text);
  if (long === null) return Number.NaN;
  const [, year = "", month = "", day = "", clock = ""] = long;
  return epochDays(Number(year), Number(month), Number(day)) * DAY_MS + clockMs(clock, 0);
}

/**
 * Whether a well-formed xsd:dateTime names its zone ("Z" or an offset).
 *
 * @example
 * hasZone("2024-06-01T12:00:00"); // false
 */
export function hasZone(raw: string): boolean {
  const text = raw.trimEnd();
  return text.endsWith("Z") || (text.charCodeAt(text.length - 3) === 58 && /[+-]\d\d:\d\d$/.test(text));
}
