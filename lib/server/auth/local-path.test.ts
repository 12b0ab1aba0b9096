import { expect, test } from "vitest";
import { HOME_PATH, localPath } from "./local-path";

test.each([
  ["/sessions", "/sessions"],
  ["/sessions?wing=a%2Fb&sort=-start#top", "/sessions?wing=a%2Fb&sort=-start#top"],
  ["/settings/sign-ins", "/settings/sign-ins"],
  ["/sessions/../quiver", "/quiver"],
])("goes on to the path of this site %j", (next, path) => {
  expect(localPath(next)).toBe(path);
});

// The list follows the OWASP Unvalidated Redirects and Forwards Cheat Sheet and the WHATWG URL parser's habits:
// a backslash counts as a slash, tabs and line ends are dropped.
test.each([
  ["//evil.example"],
  ["///evil.example"],
  ["/\\evil.example"],
  ["\\\\evil.example"],
  ["/\t/evil.example"],
  ["/\n/evil.example"],
  ["/..//evil.example"],
  ["/a/..//evil.example"],
  ["/%2e%2e//evil.example"],
  ["https://evil.example"],
  ["https:evil.example"],
  ["javascript:alert(1)"],
  [" /sessions"],
  ["sessions"],
  [""],
  ["/sign-in?next=/sign-in"],
  ["/sign-up"],
  ["/api/uploads"],
  [`/${"a".repeat(600)}`],
  [undefined],
  [["/sessions"]],
])("never leaves this site or loops for %j", (next) => {
  expect(localPath(next)).toBe(HOME_PATH);
});
