import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { afterAll, describe, expect, it } from "vitest";

const root = path.resolve(import.meta.dirname, "../..");
const session = path.join(root, "fixtures/sessions/coast-downs.gpx.gz");
const folder = mkdtempSync(path.join(tmpdir(), "trimwake-analyse-"));

afterAll(() => rmSync(folder, { recursive: true }));

function analyse(...args: string[]) {
  const tsx = path.join(root, "node_modules/.bin/tsx");
  return spawnSync(tsx, ["scripts/analyse.ts", ...args], { cwd: root, encoding: "utf8" });
}

function file(name: string, text: string): string {
  const place = path.join(folder, name);
  writeFileSync(place, text);
  return place;
}

describe("the analyse command", () => {
  it("prints one JSON object for one file, with the quality report, and ends with 0", () => {
    const input = file("input.json", JSON.stringify({ sport: "coastdown", utcOffsetH: -7 }));
    const { status, stdout, stderr } = analyse(session, "--input", input, "--json");
    expect([status, stderr]).toEqual([0, ""]);
    const result = JSON.parse(stdout) as Record<string, unknown>;
    expect(result).toMatchObject({ rawFixes: 1127, rawSegments: 1, quality: { grade: "A" } });
    expect(result.onFoilSegments).toHaveLength(12);
    expect(result.glideRatio).toBeTypeOf("number");
  });

  it("prints an array for several files, passes over a refused one with a sentence, and ends with 1", () => {
    const page = file("page.gpx", "<!doctype html><html><body>Not found</body></html>");
    const { status, stdout, stderr } = analyse(session, page, "--json");
    expect(status).toBe(1);
    expect(JSON.parse(stdout)).toHaveLength(1);
    expect(stderr).toMatch(/^page\.gpx: .+\.\n$/);
  });

  it("says how to use it when no file is named, and names a file that is not there", () => {
    expect(analyse().status).toBe(1);
    expect(analyse().stderr).toContain("usage:");
    const absent = analyse(path.join(folder, "absent.gpx"));
    expect(absent.status).toBe(1);
    expect(absent.stderr).toContain("absent.gpx");
  });

  it("prints readable lines without --json", () => {
    const { stdout } = analyse(session);
    expect(stdout).toContain("12 segments");
    expect(stdout).toMatch(/bests: 2 s \d+\.\d kn/);
  });
});
