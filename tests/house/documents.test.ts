import { spawnSync } from "node:child_process";
import { cpSync, existsSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import os from "node:os";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { filesUnder, root, textOf } from "@/tests/support/sources";

const documents = ["README.md", "DEVELOPERS.md", "fixtures/SOURCES.md"];

describe("documents", () => {
  it.each(documents)("%s names only paths that exist", (document) => {
    const named = [
      ...textOf(document).matchAll(
        /`((?:app|components|lib|db|drizzle|public|fonts|tests|fixtures|scripts|\.ci)\/[^`\s*{}<>…]*)`/g,
      ),
    ];
    const missing = named.map((match) => match[1] ?? "").filter((name) => !existsSync(path.join(root, name)));
    expect(missing).toEqual([]);
  });

  it("README.md names only npm commands that exist", () => {
    const scripts = Object.keys((JSON.parse(textOf("package.json")) as { scripts: object }).scripts);
    const named = [...textOf("README.md").matchAll(/npm run (?:-s )?([a-z:]+)/g)].map((match) => match[1]);
    expect(named.filter((name) => name === undefined || !scripts.includes(name))).toEqual([]);
  });

  it("lists every direct dependency with its reason in DEVELOPERS.md, pinned exactly", () => {
    const manifest = JSON.parse(textOf("package.json")) as {
      dependencies: Record<string, string>;
      devDependencies: Record<string, string>;
    };
    const all = { ...manifest.dependencies, ...manifest.devDependencies };
    const text = textOf("DEVELOPERS.md");
    expect(Object.keys(all).filter((name) => !text.includes(`\`${name}\``))).toEqual([]);
    expect(Object.values(all).filter((version) => !/^\d+\.\d+\.\d+$/.test(version))).toEqual([]);
  });
});

describe("the root", () => {
  it("holds only what the house or a tool demands", () => {
    const allowed = new Set([
      ...["app", "components", "lib", "db", "drizzle", "public", "fonts", "tests", "fixtures", "scripts"],
      ...[
        "README.md",
        "DEVELOPERS.md",
        "package.json",
        "package-lock.json",
        "tsconfig.json",
        "next.config.mjs",
      ],
      ...["tailwind.config.ts", "drizzle.config.ts", "vitest.config.ts", "playwright.config.ts"],
      ...["eslint.config.mjs", "postcss.config.mjs", "proxy.ts", "instrumentation.ts", ".env.example", ".ci"],
      ...[".gitignore", ".npmrc", ".prettierrc.json", ".prettierignore"],
    ]);
    const tracked = spawnSync("git", ["ls-files"], { cwd: root, encoding: "utf8" }).stdout.trim().split("\n");
    const entries = new Set(tracked.map((file) => file.split("/")[0] ?? ""));
    expect([...entries].filter((entry) => !allowed.has(entry))).toEqual([]);
  });
});

describe("migrations", () => {
  it("say the same as the schema", () => {
    const copy = mkdtempSync(path.join(os.tmpdir(), "trimwake-drizzle-"));
    try {
      cpSync(path.join(root, "drizzle"), path.join(copy, "out"), { recursive: true });
      const before = readdirSync(path.join(copy, "out")).sort();
      const config = path.join(copy, "drizzle.config.json");
      writeFileSync(
        config,
        JSON.stringify({
          dialect: "turso",
          schema: "db/schema/*.ts",
          out: path.relative(root, path.join(copy, "out")),
        }),
      );
      const result = spawnSync(
        process.execPath,
        [path.join(root, "node_modules/drizzle-kit/bin.cjs"), "generate", "--config", config],
        { cwd: root, encoding: "utf8" },
      );
      expect(result.stdout + result.stderr).toContain("nothing to migrate");
      expect(readdirSync(path.join(copy, "out")).sort()).toEqual(before);
    } finally {
      rmSync(copy, { recursive: true, force: true });
    }
  });
});

describe("sources of fixtures", () => {
  it("are stated for every folder of fixtures", () => {
    const text = textOf("fixtures/SOURCES.md");
    const files = filesUnder(["fixtures"], (file) => !file.endsWith("SOURCES.md"));
    const named = (file: string) => {
      const relative = file.slice("fixtures/".length);
      return text.includes(relative) || text.includes(`${path.posix.dirname(relative)}/ `);
    };
    const unnamed = files.filter((file) => !named(file));
    expect(unnamed).toEqual([]);
  });
});
