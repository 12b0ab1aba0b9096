import { MISSING } from "./format-number";

const two = (value: number) => String(value).padStart(2, "0");

/**
 * Elapsed time as h:mm:ss, with tenths on request. Rounded as a whole, so that 59.96 s does not become 0:00:60.
 * Input in seconds; missing gives the dash; a negative one carries a true minus sign.
 *
 * @example
 * formatDuration(4121); // "1:08:41"
 * @example
 * formatDuration(3723.45, 1); // "1:02:03.5"
 */
export function formatDuration(seconds: number | null, decimals: 0 | 1 = 0): string {
  if (seconds === null || !Number.isFinite(seconds)) return MISSING;
  const steps = decimals === 1 ? 10 : 1;
  const whole = Math.round(Math.abs(seconds) * steps);
  const s = Math.floor(whole / steps);
  const tail = decimals === 1 ? `.${whole % steps}` : "";
  const text = `${Math.floor(s / 3600)}:${two(Math.floor(s / 60) % 60)}:${two(s % 60)}${tail}`;
  return seconds < 0 && whole !== 0 ? `\u2212${text}` : text;
}

/**
 * Elapsed time in words for sentences: seconds under a minute, minutes and seconds under an hour, then hours
 * and minutes. Input in seconds; missing gives the dash.
 *
 * @example
 * durationInWords(4200); // "1\u00a0h 10\u00a0min"
 * @example
 * durationInWords(42.4); // "42\u00a0s"
 */
export function durationInWords(seconds: number | null): string {
  if (seconds === null || !Number.isFinite(seconds) || seconds < 0) return MISSING;
  const s = Math.round(seconds);
  if (s < 60) return `${s}\u00a0s`;
  if (s < 3600) {
    const rest = s % 60;
    return `${Math.floor(s / 60)}\u00a0min${rest === 0 ? "" : ` ${rest}\u00a0s`}`;
  }
  const minutes = Math.round(s / 60);
  const rest = minutes % 60;
  return `${Math.floor(minutes / 60)}\u00a0h${rest === 0 ? "" : ` ${rest}\u00a0min`}`;
}
