import { DrizzleQueryError } from "drizzle-orm/errors";
import { NextRequest } from "next/server";
import { beforeEach, describe, expect, test, vi } from "vitest";
import { AppError } from "@/lib/errors/app-error";
import { describeError, formAction, formValues } from "@/lib/server/adapter/form-state";
import { clientAddress } from "@/lib/server/adapter/request-context";
import { requireSameOrigin, routeResponse } from "@/lib/server/adapter/route-response";
import { cookieAttributes } from "@/lib/server/auth/session-cookie";
import { SESSION_COOKIE } from "@/lib/server/auth/session-cookie-name";
import { logRequestError } from "@/lib/server/context/log-request-error";
import { config, proxy } from "@/proxy";

let lines: string[];

beforeEach(() => {
  lines = [];
  vi.spyOn(process.stdout, "write").mockImplementation((line) => {
    lines.push(String(line));
    return true;
  });
});

describe("the sign-in cookie", () => {
  test("is for this host only, over https only, out of reach of scripts and of other sites' requests", () => {
    expect(SESSION_COOKIE).toMatch(/^__Host-/);
    expect(cookieAttributes()).toMatchObject({ httpOnly: true, secure: true, sameSite: "lax", path: "/" });
    expect(cookieAttributes()).not.toHaveProperty("domain");
  });
});

describe("clientAddress", () => {
  test.each([
    ["192.0.2.1", 0, null],
    [null, 1, null],
    ["192.0.2.1", 1, "192.0.2.1"],
    // The client wrote the first entry itself; the one proxy we trust added the second.
    ["10.9.9.9, 192.0.2.1", 1, "192.0.2.1"],
    ["10.9.9.9, 192.0.2.1, 198.51.100.7", 2, "192.0.2.1"],
    ["192.0.2.1", 2, null],
    ["192.0.2.1, ", 1, null],
  ])("reads %j past %i trusted proxies as %j", (header, hops, address) => {
    expect(clientAddress(header, hops)).toBe(address);
  });
});

describe("requireSameOrigin", () => {
  const ask = (headers: Record<string, string>) => () =>
    requireSameOrigin(new Request("http://trimwake.example/api/x", { method: "POST", headers }));

  test.each([
    [{ "sec-fetch-site": "same-origin" }],
    [{ origin: "http://trimwake.example", host: "trimwake.example" }],
  ])("lets our own pages through: %o", (headers) => {
    expect(ask(headers)).not.toThrow();
  });

  test.each([
    [{ "sec-fetch-site": "cross-site", origin: "http://trimwake.example", host: "trimwake.example" }],
    [{ "sec-fetch-site": "same-site" }],
    [{ "sec-fetch-site": "none" }],
    [{ origin: "http://evil.example", host: "trimwake.example" }],
    [{ origin: "null", host: "trimwake.example" }],
    [{ origin: "http://evil.example", host: "trimwake.example", "x-forwarded-host": "evil.example" }],
    [{ origin: "not an origin", host: "trimwake.example" }],
    [{}],
  ])("refuses everybody else: %o", (headers) => {
    expect(ask(headers)).toThrow(AppError);
  });
});

describe("proxy", () => {
  const through = (path: string, headers: Record<string, string> = {}) =>
    proxy(new NextRequest(`http://localhost:3000${path}`, { headers }));
  const nonceOf = (response: Response) =>
    /'nonce-([^']+)'/.exec(response.headers.get("content-security-policy") ?? "")?.[1];

  test("gives every answer a nonce of its own, and tells it to the page", () => {
    const [one, two] = [through("/"), through("/")];
    expect(Buffer.from(nonceOf(one) ?? "", "base64").length).toBeGreaterThanOrEqual(16);
    expect(nonceOf(one)).not.toBe(nonceOf(two));
    expect(one.headers.get("x-middleware-request-x-nonce")).toBe(nonceOf(one));
  });

  test("overwrites what a client claims to be the nonce or the path", () => {
    const response = through("/sessions?wing=1", { "x-nonce": "mine", "x-path": "//evil.example" });
    expect(response.headers.get("x-middleware-request-x-nonce")).not.toBe("mine");
    expect(response.headers.get("x-middleware-request-x-path")).toBe("/sessions?wing=1");
  });

  test("pages of somebody signed in are kept nowhere; routes decide for themselves", () => {
    const cookie = { cookie: `${SESSION_COOKIE}=x` };
    expect(through("/sessions", cookie).headers.get("cache-control")).toBe("no-store");
    expect(through("/api/tracks/1", cookie).headers.get("cache-control")).toBeNull();
    expect(through("/handbook").headers.get("cache-control")).toBeNull();
  });

  test("carries the headers of every page", () => {
    const { headers } = through("/");
    expect(headers.get("x-content-type-options")).toBe("nosniff");
    expect(headers.get("content-security-policy")).toContain("frame-ancestors 'none'");
  });

  test("keeps what another site sends to a page away from its actions, and says so in the log", () => {
    const send = (headers: Record<string, string>) =>
      proxy(new NextRequest("http://localhost:3000/sign-in", { method: "POST", headers }));
    const foreign: Record<string, string>[] = [
      { "sec-fetch-site": "cross-site", origin: "http://localhost:3000", host: "localhost:3000" },
      { origin: "null", host: "localhost:3000" },
      { origin: "no origin", host: "localhost:3000" },
      {},
    ];
    for (const headers of foreign) {
      const answer = send(headers);
      expect(answer.status).toBe(403);
      expect(answer.headers.get("cache-control")).toBe("no-store");
    }
    expect(lines.map((line) => JSON.parse(line).code)).toEqual(Array(4).fill("cross_site"));
    expect(send({ "sec-fetch-site": "same-origin" }).status).toBe(200);
    expect(send({ origin: "http://localhost:3000", host: "localhost:3000" }).status).toBe(200);
  });

  test.each([
    ["/", true],
    ["/iconoclast", true],
    ["/icon.svg", false],
    ["/icon.svg/x", true],
    ["/fonts/x", true],
    ["/robots.txt", true],
    ["/favicon.ico", false],
    ["/api/uploadsx", true],
    ["/api/uploads/x", true],
    ["/_next/staticx", true],
    ["/sessions", true],
    ["/api/health", true],
    ["/api/uploads", false],
    ["/_next/static/chunks/a.js", false],
  ])("stands before %s: %s", (path, expected) => {
    const patterns = config.matcher.map((pattern) => new RegExp(`^${pattern}$`));
    expect(patterns.some((pattern) => pattern.test(path))).toBe(expected);
  });
});

describe("errors on their way out", () => {
  test("an unexpected one shows a reference that the log knows, and not what it said", async () => {
    const response = await routeResponse(async () => {
      throw new Error("no such column: secret");
    });
    expect(response.status).toBe(500);
    expect(response.headers.get("content-type")).toBe("application/problem+json");
    expect(response.headers.get("cache-control")).toBe("no-store");
    const text = await response.text();
    expect(text).not.toContain("secret");
    const reference = /Reference ([0-9a-f-]{36})/.exec(text)?.[1] ?? "none";
    expect(lines.join("")).toContain(reference);
  });

  test("a failed query leaves its statement in the log, and none of its parameters", async () => {
    const params = ["runa@riders.example", "$argon2id$secret"];
    const failed = () =>
      new DrizzleQueryError("insert into user values (?, ?)", params, new Error("UNIQUE constraint failed"));
    await routeResponse(async () => {
      throw failed();
    });
    const seen = Object.assign(failed(), { digest: "12345" });
    logRequestError(seen, { path: "/reset?token=abc", method: "GET", routePath: "/reset" });
    const text = lines.join("");
    expect(text).not.toMatch(/runa@|argon2id|token=/);
    expect(text.match(/insert into user values/g)).toHaveLength(2);
    expect(text).toContain("UNIQUE constraint failed");
    expect(JSON.parse(lines[1] ?? "")).toMatchObject({ reference: "12345", path: "/reset" });
    // Next prints the same error on its own.
    expect(`${seen.message}${seen.stack}${String(seen.params)}`).not.toMatch(/runa@|argon2id/);
  });

  test("a full disk is told as such, however deep it hides", async () => {
    const full = Object.assign(new Error("database or disk is full"), { code: "SQLITE_FULL" });
    const { code, message } = await describeError(new Error("Failed query", { cause: full }));
    expect(code).toBe("internal");
    expect(message).toMatch(/^There is no room left on this server's disk\. Nothing was changed\./);
  });

  test("somebody else's row and a missing one look the same, and the denial is logged", async () => {
    const answers = [];
    for (const code of ["forbidden", "not_found"] as const) {
      const response = await routeResponse(async () => {
        throw new AppError(code, "This session is not here, or it is not yours to see.");
      });
      answers.push(response.status);
    }
    expect(answers).toEqual([404, 404]);
    expect(lines.map((line) => JSON.parse(line).event)).toEqual(["denied", "denied"]);
  });

  test.each([null, undefined, 5, "text", ["a"], { get: "x" }])(
    "an action that is given %j instead of a form says so and does nothing",
    async (posted) => {
      const work = vi.fn(async () => "done");
      expect(await formAction(posted, work)).toMatchObject({ status: "error", fields: {}, values: {} });
      expect(work).not.toHaveBeenCalled();
    },
  );

  test("a refused form gets its text back, and never its passwords, links or files", () => {
    const form = new FormData();
    form.set("name", "Aske");
    form.set("currentPassword", "secret");
    form.set("newPassword", "secret");
    form.set("token", "secret");
    form.set("$ACTION_ID", "x");
    form.set("file", new Blob(["secret"]), "a.gpx");
    expect(formValues(form)).toEqual({ name: "Aske" });
  });
});
