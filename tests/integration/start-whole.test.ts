import { spawnSync } from "node:child_process";
import { chmod, mkdtemp, readdir, rm, stat } from "node:fs/promises";
import os from "node:os";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";

const ROOT = path.resolve(import.meta.dirname, "../..");

let folder: string;

beforeEach(async () => {
  folder = await mkdtemp(path.join(os.tmpdir(), "trimwake-start-"));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

/** Runs a few lines in a process of its own, as a server that is being started. */
function run(lines: string, settings: Record<string, string> = {}) {
  const script = `async function main() { ${lines} } main().catch((e) => { console.error(e.message); process.exit(1); });`;
  return spawnSync(process.execPath, ["--import", "tsx", "--input-type=module", "-e", script], {
    cwd: ROOT,
    encoding: "utf8",
    timeout: 50_000,
    env: { ...process.env, NODE_ENV: "production", DATA_DIR: path.join(folder, "data"), ...settings },
  });
}

const START = `const { startUp } = await import("./lib/server/start/start-up.ts"); await startUp();`;

const HEALTH = `const { health } = await import("./lib/server/start/health.ts"); console.log(JSON.stringify(await health()));`;
const DATABASE = `const { database } = await import("./lib/server/context/database.ts"); const { client } = database();`;
const INSERT = `await client.execute("INSERT INTO user (id, email, password_hash, name, created_at_ms) VALUES ('a', 'a', '', 'Aske', 1)");`;
const SELECT = `console.log(JSON.stringify((await client.execute("SELECT name FROM user")).rows));`;

/** The last line a process printed, as JSON. */
const lastOf = (outcome: { stdout: string }): unknown =>
  JSON.parse(outcome.stdout.trim().split("\n").at(-1) ?? "");

test("a server starts on an empty folder, is healthy and says so", () => {
  const outcome = run(`${START} ${HEALTH} process.exit(0);`);
  expect(outcome.stderr).toBe("");
  expect(lastOf(outcome)).toMatchObject({ ok: true, database: true, storage: true });
  expect(outcome.stdout).toContain('"event":"started"');
});

test.each([
  ["process.exit(0)", 0],
  ['process.kill(process.pid, "SIGKILL")', null],
])("what was committed is there at the next start after %s", (end, status) => {
  expect(run(`${START} ${DATABASE} ${INSERT} ${end};`).status).toBe(status);
  const next = run(`${START} ${DATABASE} ${SELECT} process.exit(0);`);
  expect(next.stderr).toBe("");
  expect(lastOf(next)).toEqual([{ name: "Aske" }]);
});

test("what a server writes is out of reach of the machine's other users", async () => {
  const data = path.join(folder, "data");
  const mode = async (name: string) => ((await stat(path.join(data, name))).mode & 0o777).toString(8);
  expect(run(`${START} ${DATABASE} ${INSERT} process.kill(process.pid, "SIGKILL");`).stderr).toBe("");
  expect(await mode(".")).toBe("700");
  const names = (await readdir(data)).filter((name) => name.startsWith("trimwake.db"));
  expect(names.length).toBeGreaterThan(1);
  for (const name of names) expect(await mode(name), name).toBe("600");
  // A file that an earlier version left open to all is closed at the next start.
  await chmod(path.join(data, "trimwake.db"), 0o644);
  expect(run(`${START} process.exit(0);`).status).toBe(0);
  expect(await mode("trimwake.db")).toBe("600");
});

test("a server behind https that knows no proxy says what that costs", () => {
  const settings = { APP_ORIGIN: "https://trimwake.example" };
  expect(run(`${START} process.exit(0);`, settings).stdout).toContain('"event":"no_client_addresses"');
  const told = run(`${START} process.exit(0);`, { ...settings, TRUSTED_PROXY_HOPS: "1" });
  expect(told.stdout).not.toContain("no_client_addresses");
});

test("a server does not start with settings that cannot be used", async () => {
  const outcome = run(START, { APP_ORIGIN: "http://trimwake.example" });
  expect(outcome.status).toBe(1);
  expect(outcome.stderr).toContain("APP_ORIGIN: must begin with https://");
  expect(await readdir(folder)).toEqual([]);
});
