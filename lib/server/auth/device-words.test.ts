import { expect, test } from "vitest";
import { deviceWords } from "./device-words";

// The forms of these strings are those that browsers send (MDN Web Docs, "User-Agent").
const ANDROID =
  "Mozilla/5.0 (Linux; Android 10; K) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/130.0.0.0 Mobile Safari/537.36";
const IPHONE =
  "Mozilla/5.0 (iPhone; CPU iPhone OS 17_5 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/17.5 Mobile/15E148 Safari/604.1";

test.each([
  [ANDROID, "Chrome on Android"],
  [IPHONE, "Safari on iPhone"],
  ["Mozilla/5.0 (X11; Linux x86_64; rv:130.0) Gecko/20100101 Firefox/130.0", "Firefox on Linux"],
  [
    "Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/130.0.0.0 Safari/537.36 Edg/130.0.0.0",
    "Edge on Windows",
  ],
  [
    "Mozilla/5.0 (Macintosh; Intel Mac OS X 10_15_7) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/17.5 Safari/605.1.15",
    "Safari on Mac",
  ],
  ["curl/8.0", "Unknown device"],
  ["", "Unknown device"],
  [null, "Unknown device"],
])("names the device of %j", (userAgent, words) => {
  expect(deviceWords(userAgent)).toBe(words);
});
