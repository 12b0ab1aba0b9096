/** npm run -s analyse -- FILE... [--input FILE.input.json] [--json]: the analysis of the app, from the shell. */
import { createReadStream } from "node:fs";
import { readFile as readBytes } from "node:fs/promises";
import path from "node:path";
import process from "node:process";
import { parseArgs } from "node:util";
import { analyse } from "@/lib/analysis/analyse";
import type { Analysis } from "@/lib/analysis/analysis";
import { readFile } from "@/lib/formats/read-file";
import { describeAnalysis } from "./support/describe-analysis";
import { disciplineOf, resultShape, type SessionInput } from "./support/result-shape";

type Analysed = { readonly name: string; readonly analysis: Analysis };

const usage = "usage: npm run -s analyse -- FILE... [--input FILE.input.json] [--json]";

function complain(sentence: string): void {
  process.exitCode = 1;
  process.stderr.write(`${sentence}\n`);
}

async function inputOf(file: string | undefined): Promise<SessionInput> {
  if (file === undefined) return {};
  const parsed: unknown = JSON.parse(await readBytes(file, "utf8"));
  return typeof parsed === "object" && parsed !== null ? parsed : {};
}

async function analyseFile(file: string, input: SessionInput): Promise<Analysed[]> {
  const outcomes = await readFile(createReadStream(file, { highWaterMark: 256 * 1024 }), {
    fileName: path.basename(file),
  });
  const analysed: Analysed[] = [];
  for (const outcome of outcomes) {
    if (outcome.kind === "refused") {
      complain(`${outcome.name}: ${outcome.error.message}`);
      continue;
    }
    const analysis = analyse(outcome.fixes, {
      discipline: disciplineOf(input.sport),
      trim: null,
      minimumFlyingSpeedMps: null,
    });
    const notes = [...outcome.notes, ...analysis.quality.notes];
    analysed.push({
      name: outcome.name,
      analysis: {
        ...analysis,
        rawSegments: outcome.rawSegments,
        quality: { ...analysis.quality, notes },
      },
    });
  }
  return analysed;
}

async function main(): Promise<void> {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: { input: { type: "string" }, json: { type: "boolean", default: false } },
  });
  if (positionals.length === 0) return complain(usage);
  const input = await inputOf(values.input);
  const analysed: Analysed[] = [];
  for (const file of positionals) {
    try {
      analysed.push(...(await analyseFile(file, input)));
    } catch (error) {
      complain(`${path.basename(file)}: ${error instanceof Error ? error.message : String(error)}`);
    }
  }
  if (values.json) {
    const results = analysed.map(({ name, analysis }) => resultShape(name, analysis));
    const [only] = results;
    if (positionals.length > 1 || results.length > 1)
      process.stdout.write(`${JSON.stringify(results, null, 1)}\n`);
    else if (only) process.stdout.write(`${JSON.stringify(only, null, 1)}\n`);
    return;
  }
  const offset = typeof input.utcOffsetH === "number" ? input.utcOffsetH : 0;
  for (const { name, analysis } of analysed)
    process.stdout.write(`${describeAnalysis(name, analysis, offset)}\n`);
}

try {
  await main();
} catch (error) {
  complain(error instanceof Error ? error.message : String(error));
}
