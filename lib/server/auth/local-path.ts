/** Where somebody lands who asked for nothing in particular. */
export const HOME_PATH = "/sessions";

const BASE = "https://local.invalid";

/**
 * The path to go to after signing in, from a `next` parameter that anybody may have written: only paths of this
 * site. Browsers read a backslash as a slash and drop control characters, so `/\evil.example` and
 * `//evil.example` would leave; an address that could loop back to signing in or out is not followed either.
 */
export function localPath(next: unknown, fallback: string = HOME_PATH): string {
  if (typeof next !== "string" || next.length > 500) return fallback;
  if (!next.startsWith("/") || /^\/[/\\]/.test(next) || /[\\\u0000-\u001f\u007f]/.test(next)) return fallback;
  if (!URL.canParse(next, BASE)) return fallback;
  const url = new URL(next, BASE);
  if (url.origin !== BASE || url.pathname.startsWith("//")) return fallback;
  if (/^\/(sign-in|sign-up|api)(\/|$)/.test(url.pathname)) return fallback;
  return url.pathname + url.search + url.hash;
}
