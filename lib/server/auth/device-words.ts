const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdg(?:e|A|iOS)?\//, "Edge"],
  [/\bOPR\//, "Opera"],
  [/\bSamsungBrowser\//, "Samsung browser"],
  [/\b(?:Firefox|FxiOS)\//, "Firefox"],
  [/\b(?:Chrome|CriOS|Chromium|HeadlessChrome)\//, "Chrome"],
  [/\bSafari\//, "Safari"],
];

const MACHINES: readonly (readonly [RegExp, string])[] = [
  [/\biPhone\b/, "iPhone"],
  [/\biPad\b/, "iPad"],
  [/\bAndroid\b/, "Android"],
  [/\bCrOS\b/, "Chromebook"],
  [/\bWindows\b/, "Windows"],
  [/\b(?:Macintosh|Mac OS X)\b/, "Mac"],
  [/\bLinux\b/, "Linux"],
];

/**
 * A browser's own description of itself in words a person recognises. It is a claim of the browser and serves
 * only to tell one's own sign-ins apart.
 */
export function deviceWords(userAgent: string | null): string {
  if (userAgent === null) return "Unknown device";
  const browser = BROWSERS.find(([mark]) => mark.test(userAgent))?.[1];
  const machine = MACHINES.find(([mark]) => mark.test(userAgent))?.[1];
  if (browser !== undefined && machine !== undefined) return `${browser} on ${machine}`;
  return browser ?? machine ?? "Unknown device";
}
