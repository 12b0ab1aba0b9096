import path from "node:path";
import { pathToFileURL } from "node:url";
import { ESLint } from "eslint";
import { describe, expect, it } from "vitest";
import { filesUnder, importsOf, isSource, isTest, root } from "@/tests/support/sources";

type Zone = { readonly room: string; readonly ours: string[]; readonly npm: string[] };

/** The configuration is plain JavaScript; its shape is asserted by every test below. */
const { zones, refusal } = (await import(pathToFileURL(path.join(root, "eslint.config.mjs")).href)) as {
  zones: readonly Zone[];
  refusal: (zone: Zone) => string;
};

const rooms = ["app", "components", "lib", "db"];

/** A module each zone must refuse: the first of these that its own row does not allow. */
const forbidden = ["@/db/client", "@/app/page", "@/components/ui/button", "left-pad", "../anything"];

function violationFor(zone: Zone): string {
  const pattern = new RegExp(refusal(zone));
  const found = forbidden.find((name) => pattern.test(name));
  if (found === undefined) throw new Error(`${zone.room} refuses nothing`);
  return found;
}

describe("the zone table", () => {
  const eslint = new ESLint({ cwd: root });

  it.each(zones.map((zone) => [zone.room, zone] as const))(
    "refuses a violating sample in %s",
    async (room, zone) => {
      const sample = `import { x } from "${violationFor(zone)}";\nexport const y = x;\n`;
      const [result] = await eslint.lintText(sample, { filePath: `${room}/sample.ts` });
      const hits = result?.messages.filter((message) => message.ruleId === "no-restricted-imports") ?? [];
      expect(hits.map((message) => message.severity)).toEqual([2]);
    },
  );

  it("refuses clocks, randomness and globals in pure lib", async () => {
    const sample = [
      "export const a = () => Math.random();",
      "export const b = () => Date.now();",
      "export const c = () => new Date();",
      "export const d = () => fetch('x');",
      "export const e = () => console.log(1);",
      "export const f = () => process.cwd();",
    ].join("\n");
    const [result] = await eslint.lintText(sample, { filePath: "lib/numeric/sample.ts" });
    const lines = new Set(
      result?.messages.filter((message) => message.severity === 2).map((message) => message.line),
    );
    expect([...lines].sort()).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it("refuses process.env and direct transactions in server code", async () => {
    const sample =
      "export const a = process.env.X;\nexport const b = (db: { transaction(): void }) => db.transaction();\n";
    const [result] = await eslint.lintText(sample, { filePath: "lib/server/accounts/sample.ts" });
    const hits = result?.messages.filter((message) => message.ruleId === "no-restricted-syntax") ?? [];
    expect(hits.map((message) => message.line)).toEqual([1, 2]);
  });

  it("refuses any and non-null assertions everywhere", async () => {
    const sample = "export const a = (x: any) => x;\nexport const b = (x: string | null) => x!;\n";
    const [result] = await eslint.lintText(sample, { filePath: "lib/units/sample.ts" });
    const rules = result?.messages
      .filter((message) => message.severity === 2)
      .map((message) => message.ruleId);
    expect(rules).toContain("@typescript-eslint/no-explicit-any");
    expect(rules).toContain("@typescript-eslint/no-non-null-assertion");
  });
});

describe("real imports", () => {
  const bySize = [...zones].sort((a, b) => b.room.length - a.room.length);
  const files = filesUnder(rooms, (file) => isSource(file) && !isTest(file));

  it("point one way, dynamic ones too", () => {
    const offences: string[] = [];
    for (const file of files) {
      const zone = bySize.find((candidate) => file.startsWith(`${candidate.room}/`));
      if (zone === undefined) continue;
      const pattern = new RegExp(refusal(zone));
      for (const name of importsOf(file)) if (pattern.test(name)) offences.push(`${file} -> ${name}`);
    }
    expect(offences).toEqual([]);
  });

  it("cover every source file by a zone", () => {
    const homeless = files.filter((file) => !bySize.some((zone) => file.startsWith(`${zone.room}/`)));
    expect(homeless).toEqual([]);
  });
});
