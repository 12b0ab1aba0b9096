// Steps shared by the commands that must work on a machine with only Node and npm: no packages here.
import { spawn, spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import net from "node:net";
import path from "node:path";
import process from "node:process";

export const root = path.resolve(import.meta.dirname, "../..");

const quietEnv = { NEXT_TELEMETRY_DISABLED: "1", PLAYWRIGHT_SKIP_BROWSER_DOWNLOAD: "1" };

export function say(text) {
  process.stdout.write(`${text}\n`);
}

/** Stops with a sentence when this Node is too old to run anything else. */
export function requireNode() {
  const [major, minor] = process.versions.node.split(".").map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  say(`Trimwake needs Node 20.19 or newer; this is ${process.versions.node}.`);
  process.exit(1);
}

/** Runs a command to its end with inherited output; returns its exit status (1 when it could not start). */
export function run(command, args, options = {}) {
  const result = spawnSync(command, args, {
    cwd: root,
    stdio: "inherit",
    ...options,
    env: { ...process.env, ...quietEnv, ...options.env },
  });
  return result.status ?? 1;
}

/** Starts a command that goes on beside this process. */
export function start(command, args, options = {}) {
  return spawn(command, args, {
    cwd: root,
    stdio: "inherit",
    ...options,
    env: { ...process.env, ...quietEnv, ...options.env },
  });
}

/** The path of an installed package's command, run by this Node so that no shell is between. */
export function bin(name) {
  const places = {
    next: "next/dist/bin/next",
    tsx: "tsx/dist/cli.mjs",
    vitest: "vitest/vitest.mjs",
    eslint: "eslint/bin/eslint.js",
    prettier: "prettier/bin/prettier.cjs",
    tsc: "typescript/bin/tsc",
    playwright: "@playwright/test/cli.js",
  };
  return path.join(root, "node_modules", places[name]);
}

function hashFiles(entries) {
  const hash = createHash("sha256");
  const visit = (relative) => {
    const full = path.join(root, relative);
    if (!existsSync(full)) return;
    try {
      for (const name of readdirSync(full).sort()) visit(path.join(relative, name));
    } catch {
      hash.update(relative).update("\0").update(readFileSync(full)).update("\0");
    }
  };
  for (const entry of entries) visit(entry);
  return hash.digest("hex");
}

function fresh(stampFile, value) {
  return existsSync(stampFile) && readFileSync(stampFile, "utf8") === value;
}

function stamp(stampFile, value) {
  mkdirSync(path.dirname(stampFile), { recursive: true });
  writeFileSync(stampFile, value);
}

/** Installs exactly what the lock file says, when it has not been done for this lock file. */
export function ensureInstalled() {
  const file = path.join(root, "node_modules", ".trimwake-installed");
  const value = hashFiles(["package-lock.json"]);
  if (fresh(file, value)) return;
  say("Installing packages (a minute or two the first time)");
  if (run("npm", ["ci", "--no-audit", "--no-fund"], { shell: process.platform === "win32" }) !== 0) {
    say("Packages could not be installed. Check the network and run the command again.");
    process.exit(1);
  }
  stamp(file, value);
}

/** What a build is made of. */
const buildInputs = [
  "app",
  "components",
  "lib",
  "db",
  "drizzle",
  "public",
  "fonts",
  "package-lock.json",
  "next.config.mjs",
  "postcss.config.mjs",
  "tailwind.config.ts",
  "tsconfig.json",
  "proxy.ts",
  "instrumentation.ts",
  "scripts/build-worker.mjs",
];

/** Builds the app when its sources changed since the last build; returns whether a build stands. */
export function ensureBuilt() {
  const file = path.join(root, ".next", "trimwake-built");
  const value = hashFiles(buildInputs);
  if (fresh(file, value) && existsSync(path.join(root, "build", "analysis-worker.mjs"))) return true;
  say("Building Trimwake (about a minute)");
  const node = process.execPath;
  const built =
    run(node, ["scripts/build-worker.mjs"]) === 0 &&
    run(node, [bin("next"), "build"], { env: { NODE_ENV: "production" } }) === 0;
  if (built) stamp(file, value);
  return built;
}

/** Answers once the server's health does, or null after the time given or when the server has ended. */
export async function waitForHealth(port, child, seconds) {
  for (let tick = 0; tick < seconds * 5; tick += 1) {
    if (child.exitCode !== null) return null;
    const answer = await fetch(`http://localhost:${port}/api/health`).catch(() => null);
    if (answer !== null && answer.ok) return answer.json();
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  return null;
}

/** Stops with a sentence when something listens on the port already. */
export async function requireFreePort(port) {
  const free = await new Promise((resolve) => {
    const probe = net.createServer();
    probe.once("error", () => resolve(false));
    probe.listen(port, () => probe.close(() => resolve(true)));
  });
  if (free) return;
  say(`Port ${port} is in use. End what listens there, or choose another: PORT=3001 before the command.`);
  process.exit(1);
}

/**
 * Serves the built app until it is told to stop. The first Ctrl-C or SIGTERM ends the server and this command
 * with status 0; children given along are ended too. `ownGroup` keeps a terminal's Ctrl-C from reaching the server twice.
 */
export async function serve({ port, env, others = [], ready, ownGroup = true }) {
  const server = start(process.execPath, [bin("next"), "start", "--port", String(port)], {
    env: { ...env, PORT: String(port), NODE_ENV: "production" },
    detached: ownGroup && process.platform !== "win32",
  });
  let stopping = false;
  const ended = new Promise((resolve) => server.once("exit", (code) => resolve(code)));
  const stop = () => {
    if (stopping) return;
    stopping = true;
    for (const child of others) child.kill("SIGTERM");
    if (server.exitCode === null) server.kill("SIGTERM");
    setTimeout(() => server.kill("SIGKILL"), 10_000).unref();
  };
  process.on("SIGINT", stop);
  process.on("SIGTERM", stop);
  const healthy = await waitForHealth(port, server, 60);
  if (healthy !== null) ready();
  else if (!stopping && server.exitCode === null) say("The server has not become healthy within a minute.");
  const code = await ended;
  for (const child of others) child.kill("SIGTERM");
  if (stopping) {
    say("Trimwake has stopped.");
    process.exit(0);
  }
  process.exit(code ?? 1);
}

/** Reads a port setting, refusing nonsense in words. */
export function portFromEnv() {
  const text = process.env.PORT ?? "3000";
  const port = Number(text);
  if (Number.isInteger(port) && port > 0 && port < 65536) return port;
  say(`PORT must be a number from 1 to 65535, not "${text}".`);
  process.exit(1);
}
