import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from "vitest";
import type { Database } from "@/db/client";
import { AppError } from "@/lib/errors/app-error";
import type { Context } from "@/lib/server/context/context";
import { parseLogFilter } from "@/lib/server/log/log-filter";
import { diskStorage } from "@/lib/server/storage/disk-storage";
import { replaceStorage } from "@/lib/server/storage/storage";
import { PASSWORD } from "@/tests/support/accounts";
import {
  belongings,
  bodyOf,
  makeAccessWorld,
  OWN_BYTES,
  type AccessWorld,
} from "@/tests/support/access-world";
import { FRONT_WING } from "@/tests/support/gear-rows";
import { filesUnder, isSource, isTest, root, textOf } from "@/tests/support/sources";
import { openTestDatabase, testContext } from "@/tests/support/test-database";

const current = vi.hoisted((): { context: unknown } => ({ context: null }));
vi.mock("@/lib/server/adapter/request-context", () => ({
  requestContext: () => Promise.resolve(current.context as Context),
}));
vi.mock("@/lib/server/auth/current-user", () => ({ currentUser: () => Promise.resolve(null) }));

type Verb = (ctx: Context, ...rest: unknown[]) => Promise<unknown>;
type Arguments = (world: AccessWorld) => readonly unknown[];

/**
 * How a verb answers those who are not the owner of what it is asked about.
 * - `account`: nobody signed out. A stranger who names the owner's rows gets `stranger`: a refusal by code, or `blind`: an
 *   answer about the stranger's own things only.
 * - `open`: anybody; it hangs on a password or on a link from the mailbox instead.
 * - `system`: the server itself only.
 * - `inside`: takes what its caller has fetched for the asker; nothing in app/ may call it.
 */
type Access =
  | { who: "account"; stranger: "blind" | AppError["code"]; calls: readonly Arguments[] }
  | { who: "open" | "system" | "inside" };

const refused = (stranger: AppError["code"], ...calls: Arguments[]): Access => ({
  who: "account",
  stranger,
  calls,
});
const blind = (...calls: Arguments[]): Access => ({ who: "account", stranger: "blind", calls });
const OPEN: Access = { who: "open" };

const span = (setupId: string) => [{ setupId, startMs: null, endMs: null }];
const part = { ...FRONT_WING, maker: "Changed" };
const setup = (frontWingId: string) => ({ name: "Changed", frontWingId });
const ALL = parseLogFilter({});
const OF_OWNER: Arguments = ({ ids }) => [
  parseLogFilter({ setup: ids.setup, frontWing: ids.part, part: ids.part, spot: "Owner's spot" }),
];

const VERBS: Readonly<Record<string, Access>> = {
  "gear/read-gear listParts": blind(() => []),
  "gear/read-gear getPart": refused("not_found", ({ ids }) => [ids.part]),
  "gear/read-gear listSetups": blind(() => []),
  "gear/read-gear getSetup": refused("not_found", ({ ids }) => [ids.setup]),
  "gear/read-gear lastUsedSetup": blind(() => []),
  "gear/read-gear listGearSpans": blind(({ ids }) => [ids.session]),
  "gear/save-part createPart": blind(() => [part]),
  "gear/save-part updatePart": refused("not_found", ({ ids }) => [ids.part, part]),
  "gear/save-part retirePart": refused("not_found", ({ ids }) => [ids.part, true]),
  "gear/save-setup createSetup": refused("validation", ({ ids }) => [setup(ids.part)]),
  "gear/save-setup updateSetup": refused("not_found", ({ ids, strangerWingId }) => [
    ids.setup,
    setup(strangerWingId),
  ]),
  "gear/save-setup retireSetup": refused("not_found", ({ ids }) => [ids.setup, true]),
  "gear/set-gear-spans setGearSpans": refused(
    "not_found",
    ({ ids }) => [ids.session, []],
    ({ ids, strangerSetupId }) => [ids.session, span(strangerSetupId)],
  ),
  "sessions/delete-session deleteSession": refused("not_found", ({ ids }) => [ids.session]),
  "sessions/delete-session restoreSession": refused("not_found", ({ ids }) => [ids.session]),
  "sessions/get-raw-file getRawFile": refused("not_found", ({ ids }) => [ids.session]),
  "sessions/get-session getSession": refused("not_found", ({ ids }) => [ids.session]),
  "sessions/get-track-payload getTrackPayload": refused("not_found", ({ ids }) => [ids.session]),
  "sessions/reanalyse-old-sessions reanalyseOldSessions": { who: "system" },
  "sessions/reanalyse-session analyseAgain": { who: "inside" },
  "sessions/trim-session trimSession": refused("not_found", ({ ids }) => [ids.session, null]),
  "sessions/update-session updateSession": refused("not_found", ({ ids }) => [ids.session, { title: "x" }]),
  "uploads/import-upload importUpload": refused(
    "not_found",
    ({ ids }) => [{ uploadId: ids.upload, setupId: null }],
    ({ ids, strangerUploadId }) => [{ uploadId: strangerUploadId, setupId: ids.setup }],
  ),
  "uploads/list-waiting-uploads listWaitingUploads": blind(() => []),
  // The owner's very bytes tell nobody else that they are here.
  "uploads/receive-upload receiveUpload": blind(() => [
    { fileName: "a.gpx", body: bodyOf(OWN_BYTES), declaredBytes: null },
  ]),
  "places/list-places listPlaces": blind(() => []),
  "places/record-place recordPlace": refused("not_found", ({ ids }) => [
    { sessionId: ids.session, end: "start", name: "Mine" },
  ]),
  "log/filter-choices filterChoices": blind(() => []),
  "log/list-log listLog": blind(() => [ALL], OF_OWNER),
  "log/list-log logRows": blind((world) => [...OF_OWNER(world), { limit: 50, offset: 0 }]),
  "log/list-log listSpots": blind(() => []),
  "log/log-csv logCsv": blind(() => [ALL, { speed: "kn", distance: "km" }]),
  "compare/compare-gear compareGear": blind(
    () => [ALL, "setup"],
    (world) => [...OF_OWNER(world), "front_wing"],
  ),
  "accounts/change-email changeEmail": blind(({ ownerEmail }) => [
    { email: ownerEmail, currentPassword: PASSWORD },
  ]),
  "accounts/change-password changePassword": blind(() => [
    { currentPassword: PASSWORD, newPassword: "east of the breakwater", endOthers: true },
    "Test",
  ]),
  "accounts/confirm-email confirmEmail": OPEN,
  "accounts/confirm-email isConfirmLinkAlive": OPEN,
  "accounts/end-other-sign-ins endOtherSignIns": blind(() => []),
  "accounts/end-sign-in endSignIn": refused("not_found", ({ ids }) => [{ id: ids.signIn }]),
  "accounts/internal reauthenticate": { who: "inside" },
  "accounts/list-sign-ins listSignIns": blind(() => []),
  "accounts/request-password-reset requestPasswordReset": OPEN,
  "accounts/resend-confirmation resendConfirmation": OPEN,
  "accounts/reset-password resetPassword": OPEN,
  "accounts/reset-password isResetLinkAlive": OPEN,
  "accounts/sign-in signIn": OPEN,
  "accounts/sign-out signOut": OPEN,
  "accounts/sign-up signUp": OPEN,
  "accounts/update-profile updateProfile": blind(() => [{ name: "Somebody", weight: "80" }]),
  "accounts/update-theme updateTheme": blind(() => [{ theme: "dark" }]),
  "accounts/update-units updateUnits": blind(() => [{ speed: "kn", distance: "NM" }]),
};

/** Who may use a route; `own` ones answer 401 to nobody and 404 to a stranger. Changing methods must check the origin. */
const ROUTES: Readonly<Record<string, { methods: readonly string[]; who: "anybody" | "account" | "own" }>> = {
  "app/api/health/route.ts": { methods: ["GET"], who: "anybody" },
  "app/api/log/route.ts": { methods: ["GET"], who: "account" },
  "app/api/map/status/route.ts": { methods: ["GET"], who: "anybody" },
  "app/api/map/style/route.ts": { methods: ["GET"], who: "anybody" },
  "app/api/map/tiles/[stamp]/[z]/[x]/[y]/route.ts": { methods: ["GET"], who: "anybody" },
  "app/api/sessions/[sessionId]/raw/route.ts": { methods: ["GET"], who: "own" },
  "app/api/sessions/[sessionId]/track/route.ts": { methods: ["GET"], who: "own" },
  "app/api/uploads/route.ts": { methods: ["POST"], who: "account" },
};

const NOUNS = ["gear", "sessions", "uploads", "places", "log", "compare", "accounts"];

/** Exported functions whose first argument is the context: what the rest of the house can ask the server to do. */
const found = filesUnder(
  NOUNS.map((noun) => `lib/server/${noun}`),
  (file) => isSource(file) && !isTest(file),
).flatMap((file) =>
  [
    ...textOf(file).matchAll(
      /export (?:async )?(?:function|const) (\w+)\s*(?:=\s*(?:async\s*)?)?\(\s*ctx\b/g,
    ),
  ].map(([, name]) => `${file.replace("lib/server/", "").replace(/\.ts$/, "")} ${name}`),
);

async function verbNamed(name: string): Promise<Verb> {
  const [file = "", exported = ""] = name.split(" ");
  const loaded = (await import(/* @vite-ignore */ `${root}/lib/server/${file}.ts`)) as Record<string, Verb>;
  const verb = loaded[exported];
  if (verb === undefined) throw new Error(`no ${exported} in ${file}`);
  return verb;
}

const codeOf = (work: Promise<unknown>): Promise<string> =>
  work.then(
    () => "answered",
    (error: unknown) => (error instanceof AppError ? error.code : String(error)),
  );

let db: Database;
let close: () => Promise<void>;
let world: AccessWorld;

beforeAll(async () => {
  const opened = await openTestDatabase();
  ({ db, close } = opened);
  replaceStorage(diskStorage(opened.folder));
  vi.spyOn(process.stdout, "write").mockImplementation(() => true);
  world = await makeAccessWorld(db);
});
afterAll(async () => {
  replaceStorage(undefined);
  await close();
});
beforeEach(() => {
  vi.spyOn(process.stdout, "write").mockImplementation(() => true);
});

describe("verbs", () => {
  test("every one stands in the table, and the table names no other", () => {
    expect([...found].sort()).toEqual(Object.keys(VERBS).sort());
  });

  const withAccount = Object.entries(VERBS).flatMap(([name, access]) =>
    access.who === "account" ? [{ name, ...access }] : [],
  );

  test.each(withAccount)(
    "$name refuses whoever is not signed in and changes nothing",
    async ({ name, calls }) => {
      const verb = await verbNamed(name);
      const before = await belongings(db, world.ids.user);
      for (const call of calls) {
        expect(await codeOf(verb(testContext(db), ...call(world)))).toBe("unauthenticated");
        expect(await codeOf(verb(testContext(db, { system: true }), ...call(world)))).toBe("unauthenticated");
      }
      expect(await belongings(db, world.ids.user)).toBe(before);
    },
  );

  test.each(withAccount)("$name gives a stranger: $stranger", async ({ name, calls, stranger }) => {
    const verb = await verbNamed(name);
    const before = await belongings(db, world.ids.user);
    for (const call of calls) {
      if (stranger !== "blind") {
        expect(await codeOf(verb(world.stranger, ...call(world)))).toBe(stranger);
        continue;
      }
      const answer = JSON.stringify((await verb(world.stranger, ...call(world))) ?? null);
      for (const id of Object.values(world.ids)) expect(answer).not.toContain(id);
      expect(answer).not.toMatch(/Owner's/);
    }
    expect(await belongings(db, world.ids.user)).toBe(before);
  });

  test("the owner is not refused, so that the refusals above mean something", async () => {
    const { owner, ids } = world;
    for (const [name, argument] of [
      ["gear/read-gear getPart", ids.part],
      ["gear/read-gear getSetup", ids.setup],
      ["sessions/get-session getSession", ids.session],
      ["sessions/get-track-payload getTrackPayload", ids.session],
    ] as const) {
      expect(await codeOf((await verbNamed(name))(owner, argument)), name).toBe("answered");
    }
    const log = JSON.stringify(await (await verbNamed("log/list-log listLog"))(owner, ...OF_OWNER(world)));
    expect(log).toContain(ids.session);
  });

  const named = (who: Access["who"]) =>
    Object.entries(VERBS).flatMap(([name, access]) => (access.who === who ? [name] : []));

  test.each(named("system"))("%s is for the server itself only", async (name) => {
    const verb = await verbNamed(name);
    expect(await codeOf(verb(testContext(db), () => undefined))).toBe("forbidden");
    expect(await codeOf(verb(world.owner, () => undefined))).toBe("forbidden");
  });

  test.each(named("inside"))("%s is called by nothing in app/", (name) => {
    const exported = name.split(" ")[1] ?? "";
    const callers = filesUnder(["app"], isSource).filter((file) => textOf(file).includes(exported));
    expect(callers).toEqual([]);
  });
});

describe("routes", () => {
  const files = filesUnder(["app"], (file) => /(^|\/)route\.tsx?$/.test(file));
  type Handler = (request: Request, of: { params: Promise<Record<string, string>> }) => Promise<Response>;

  async function ask(file: string, method: string, context: Context): Promise<Response> {
    current.context = context;
    const loaded = (await import(/* @vite-ignore */ `${root}/${file}`)) as Record<string, Handler>;
    const handler = loaded[method];
    if (handler === undefined) throw new Error(`no ${method} in ${file}`);
    const headers = { "sec-fetch-site": "same-origin" };
    const request = new Request("http://localhost:3000/api", { method, headers });
    return handler(request, { params: Promise.resolve({ sessionId: world.ids.session }) });
  }

  test("every one stands in the table with its methods, and the table names no other", () => {
    const methods = Object.fromEntries(
      files.map((file) => [
        file,
        [
          ...textOf(file).matchAll(
            /export (?:async function|const) (GET|HEAD|POST|PUT|PATCH|DELETE|OPTIONS)\b/g,
          ),
        ].map(([, method]) => method),
      ]),
    );
    expect(methods).toEqual(
      Object.fromEntries(Object.entries(ROUTES).map(([file, { methods: list }]) => [file, list])),
    );
  });

  const guarded = Object.entries(ROUTES).flatMap(([file, { methods, who }]) =>
    who === "anybody" ? [] : methods.map((method) => ({ file, method, who })),
  );

  test.each(guarded)("$method $file answers 401 to whoever is not signed in", async ({ file, method }) => {
    const answer = await ask(file, method, testContext(db));
    expect(answer.status).toBe(401);
    expect(answer.headers.get("cache-control")).toBe("no-store");
  });

  test.each(guarded.filter(({ who }) => who === "own"))(
    "$method $file answers 404 to a stranger, without a word of what is there",
    async ({ file, method }) => {
      const answer = await ask(file, method, world.stranger);
      expect(answer.status).toBe(404);
      expect(await answer.text()).not.toMatch(/Owner's|own\.gpx/);
    },
  );

  test("the log route shows a stranger none of the owner's sessions", async () => {
    const answer = await ask("app/api/log/route.ts", "GET", world.stranger);
    expect(answer.status).toBe(200);
    expect(await answer.text()).not.toContain("Owner's");
  });

  test("those that change something ask where the request comes from", () => {
    const changing = files.filter((file) =>
      /export (async function|const) (POST|PUT|PATCH|DELETE)/.test(textOf(file)),
    );
    for (const file of changing) expect(textOf(file), file).toContain("requireSameOrigin(request)");
  });
});

test("a page of one row can still be a 404 when the row is not there: nothing is sent before that is known", () => {
  const waiting = filesUnder(["app"], (file) => file.endsWith("/loading.tsx")).map((file) =>
    file.replace(/loading\.tsx$/, ""),
  );
  const pages = filesUnder(["app"], (file) => /\[.*\/page\.tsx$/.test(file));
  expect(pages.length).toBeGreaterThan(2);
  // With a loading.tsx above it a page begins to stream with status 200, and a stranger gets that.
  expect(pages.filter((page) => waiting.some((folder) => page.startsWith(folder)))).toEqual([]);
});

describe("actions", () => {
  const files = filesUnder(["app", "components", "lib"], isSource).filter((file) =>
    /^\s*["']use server["'];/m.test(textOf(file)),
  );

  test("each gets its context from the request and leaves every decision to verbs", () => {
    expect(files.length).toBeGreaterThan(5);
    for (const file of files) {
      const text = textOf(file);
      expect(text, `${file}: at the top of the file, for all of it`).toMatch(/^"use server";/);
      expect(text, file).toContain("requestContext()");
      expect(text, `${file}: rows are the verbs' business`).not.toMatch(/from "@\/db\/|database\(\)/);
    }
  });
});
