import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import path from "node:path";
import { expect, test } from "vitest";
import { contentSecurityPolicy, securityHeaders, SONNER_STYLE_HASHES } from "./security-headers";

const settings = { nonce: "bm9uY2U=", isDevelopment: false, isHttps: true, mapStyleUrl: null };

function directive(policy: string, name: string): string[] {
  const found = policy.split("; ").find((part) => part === name || part.startsWith(`${name} `));
  return found?.split(" ").slice(1) ?? [];
}

test("scripts run with this answer's nonce only: nothing inline, no eval, no other site", () => {
  const policy = contentSecurityPolicy(settings);
  expect(directive(policy, "script-src")).toEqual(["'self'", "'nonce-bm9uY2U='", "'strict-dynamic'"]);
  expect(directive(policy, "default-src")).toEqual(["'self'"]);
  expect(policy).not.toContain("unsafe-eval");
  expect(policy.replace("style-src-attr 'unsafe-inline'", "")).not.toContain("unsafe-inline");
  expect(policy).not.toMatch(/https?:|\*/);
});

test("no other site may frame a page, receive its forms or change its base", () => {
  const policy = contentSecurityPolicy(settings);
  expect(directive(policy, "frame-ancestors")).toEqual(["'none'"]);
  expect(directive(policy, "form-action")).toEqual(["'self'"]);
  expect(directive(policy, "base-uri")).toEqual(["'none'"]);
  expect(directive(policy, "object-src")).toEqual(["'none'"]);
  expect(directive(policy, "worker-src")).toEqual(["'self'"]);
});

test("eval and web sockets are open to the development server alone", () => {
  const policy = contentSecurityPolicy({ ...settings, isDevelopment: true });
  expect(directive(policy, "script-src")).toContain("'unsafe-eval'");
  expect(directive(policy, "connect-src")).toContain("ws:");
  expect(directive(contentSecurityPolicy(settings), "connect-src")).toEqual(["'self'"]);
});

test("a map style of one's own opens pictures and data to other sites, and nothing else", () => {
  const policy = contentSecurityPolicy({ ...settings, mapStyleUrl: "https://maps.example/style.json" });
  expect(directive(policy, "connect-src")).toEqual(["'self'", "https:"]);
  expect(directive(policy, "img-src")).toContain("https:");
  expect(directive(policy, "script-src")).not.toContain("https:");
});

test("the browser is told to insist on https only where the site is served by https", () => {
  // OWASP ASVS 5.0, 3.4.1: at least one year.
  expect(securityHeaders(settings)["strict-transport-security"]).toBe("max-age=31536000; includeSubDomains");
  const plain = securityHeaders({ ...settings, isHttps: false });
  expect(plain).not.toHaveProperty("strict-transport-security");
  expect(plain["content-security-policy"]).not.toContain("upgrade-insecure-requests");
});

test("types are not guessed and addresses are told to no other site", () => {
  expect(securityHeaders(settings)).toMatchObject({
    "x-content-type-options": "nosniff",
    "referrer-policy": "same-origin",
    "x-frame-options": "DENY",
  });
});

test("the allowed style sheets are the empty one and the one the installed sonner inserts", () => {
  const source = readFileSync(path.resolve("node_modules/sonner/dist/index.mjs"), "utf8");
  const literal = /__insertCSS\(("(?:[^"\\]|\\.)*")\)/.exec(source)?.[1] ?? "";
  const css: unknown = JSON.parse(literal.replaceAll("\\'", "'"));
  const hash = (text: string) => `sha256-${createHash("sha256").update(text).digest("base64")}`;
  expect(SONNER_STYLE_HASHES).toEqual([hash(""), hash(String(css))]);
});
