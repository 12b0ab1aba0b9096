import path from "node:path";
import { pathToFileURL } from "node:url";
import { describe, expect, it } from "vitest";
import { filesUnder, isSource, isTest, root, textOf } from "@/tests/support/sources";

type Example = { file: string; expression: string; expected: string };

/** The lines `expression; // literal` under each @example of the pure rooms. */
function examples(): Example[] {
  const pure = [
    "units",
    "errors",
    "numeric",
    "stats",
    "geo",
    "track",
    "formats",
    "analysis",
    "gear",
    "display",
  ];
  const files = filesUnder(
    pure.map((room) => `lib/${room}`),
    (file) => isSource(file) && file.endsWith(".ts") && !isTest(file),
  );
  return files.flatMap((file) =>
    [...textOf(file).matchAll(/@example([\s\S]*?)(?=\n \* @|\*\/)/g)].flatMap((block) =>
      [...(block[1] ?? "").matchAll(/^\s*\*\s+([^\n]+?);? \/\/ (.+?)\s*$/gm)].map((line) => ({
        file,
        expression: line[1] ?? "",
        expected: line[2] ?? "",
      })),
    ),
  );
}

const evaluate = (expression: string, scope: Record<string, unknown>): unknown => {
  const names = Object.keys(scope);
  return new Function(...names, `return (${expression});`)(...names.map((name) => scope[name]));
};

function expectSame(actual: unknown, expected: unknown, where: string): void {
  if (typeof expected === "number" && typeof actual === "number" && Number.isFinite(expected)) {
    expect(Math.abs(actual - expected), where).toBeLessThanOrEqual(1e-9 * Math.max(1, Math.abs(expected)));
  } else if (ArrayBuffer.isView(actual)) expect(Array.from(actual as Float64Array), where).toEqual(expected);
  else expect(actual, where).toEqual(expected);
}

describe("docstring examples", () => {
  const found = examples();

  it("exist", () => {
    expect(found.length).toBeGreaterThan(20);
  });

  it.each(found.map((example) => [`${example.file}: ${example.expression}`, example] as const))(
    "%s",
    async (name, { file, expression, expected }) => {
      const scope = (await import(/* @vite-ignore */ pathToFileURL(path.join(root, file)).href)) as Record<
        string,
        unknown
      >;
      expectSame(await evaluate(expression, scope), evaluate(expected, scope), name);
    },
  );
});
