import ts from "typescript";
import { describe, expect, it } from "vitest";
import { filesUnder, isSource, isTest, parse, textOf } from "@/tests/support/sources";

const rooms = ["app", "components", "lib", "db"];
const sources = filesUnder(rooms, (file) => isSource(file) && !isTest(file));
const linesOf = (file: string) => textOf(file).trimEnd().split("\n").length;

describe("sizes", () => {
  it("keeps pages to 60 lines and route adapters to 40", () => {
    const limits: readonly [RegExp, number][] = [
      [/\/page\.tsx$/, 60],
      [/\/route\.ts$/, 40],
    ];
    const over = sources.flatMap((file) =>
      limits
        .filter(([name, limit]) => name.test(file) && linesOf(file) > limit)
        .map(([, limit]) => `${file} > ${limit}`),
    );
    expect(over).toEqual([]);
  });

  it("keeps nine files in ten within 200 lines and none over 400", () => {
    const lengths = sources.map(linesOf).sort((a, b) => a - b);
    expect(lengths.at(-1)).toBeLessThanOrEqual(400);
    expect(lengths[Math.floor(lengths.length * 0.9)]).toBeLessThanOrEqual(200);
  });
});

describe("environment variables", () => {
  it("are read only by the settings module and the start hook", () => {
    const readers = sources.filter((file) => /process\.env\b/.test(textOf(file)));
    expect(readers).toEqual(["lib/server/env/env.ts"]);
  });
});

describe("names", () => {
  it("are kebab-case, and no drawer-like folder exists", () => {
    const plain = sources.filter((file) => !file.startsWith("app/"));
    const odd = plain.filter((file) => !/^[a-z0-9./-]+$/.test(file));
    const drawers = sources.filter((file) => /(^|\/)(utils|helpers|misc|hooks|types)(\/|\.)/.test(file));
    expect([...odd, ...drawers]).toEqual([]);
  });

  it("have no barrels", () => {
    expect(sources.filter((file) => /(^|\/)index\.tsx?$/.test(file))).toEqual([]);
  });

  it("have default exports only where Next or the worker pool asks for one", () => {
    const allowed =
      /^lib\/worker\/analysis-worker\.ts$|^app\/.*(page|layout|loading|error|global-error|not-found|template|default|icon|opengraph-image|manifest|robots|sitemap)\.tsx?$/;
    const offences = sources.filter((file) => !allowed.test(file) && /^export default/m.test(textOf(file)));
    expect(offences).toEqual([]);
  });
});

describe("docstrings", () => {
  it("stand on every export of lib", () => {
    const missing: string[] = [];
    for (const file of sources.filter((name) => name.startsWith("lib/") && name.endsWith(".ts"))) {
      for (const statement of parse(file).statements) {
        const documented = ts.isFunctionDeclaration(statement) || ts.isClassDeclaration(statement);
        if (!documented || !ts.canHaveModifiers(statement)) continue;
        const exported = ts.getModifiers(statement)?.some((m) => m.kind === ts.SyntaxKind.ExportKeyword);
        if (exported === true && ts.getJSDocCommentsAndTags(statement).length === 0) {
          missing.push(`${file}: ${statement.name?.text ?? "?"}`);
        }
      }
    }
    expect(missing).toEqual([]);
  });
});

describe("words", () => {
  const shown = filesUnder(["app", "components", "lib/display"], (file) => isSource(file) && !isTest(file));

  it("never write knots as kt or kts, nor a unit in capitals", () => {
    const banned = /["'`> ](kts|knts|kt|KN|Kts)["'`< ]/;
    expect(shown.filter((file) => banned.test(textOf(file)))).toEqual([]);
  });

  it("never apologise, plead or shout at the rider", () => {
    const banned = />[^<{]*\b(Oops|Sorry|Please)\b/;
    expect(shown.filter((file) => banned.test(textOf(file)))).toEqual([]);
  });
});
