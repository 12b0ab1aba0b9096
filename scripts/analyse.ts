/** npm run -s analyse -- FILE... [--input FILE.input.json] [--json]: the analysis of the app, from the shell. */
import { readFile } from "node:fs/promises";
import path from "node:path";
import process from "node:process";
import { parseArgs } from "node:util";
import type { Analysis } from "@/lib/analysis/analysis";
import { analyseFile } from "./support/analyse-file";
import { describeAnalysis } from "./support/describe-analysis";
import { resultShape, type SessionInput } from "./support/result-shape";

type Analysed = { readonly name: string; readonly analysis: Analysis };

const usage = "usage: npm run -s analyse -- FILE... [--input FILE.input.json] [--json]";

function complain(sentence: string): void {
  process.exitCode = 1;
  process.stderr.write(`${sentence}\n`);
}

const sentenceOf = (error: unknown): string => (error instanceof Error ? error.message : String(error));

async function inputOf(file: string | undefined): Promise<SessionInput> {
  if (file === undefined) return {};
  const parsed: unknown = JSON.parse(await readFile(file, "utf8"));
  return typeof parsed === "object" && parsed !== null ? parsed : {};
}

async function analyseAll(files: readonly string[], input: SessionInput): Promise<Analysed[]> {
  const analysed: Analysed[] = [];
  for (const file of files) {
    try {
      for (const outcome of await analyseFile(file, input)) {
        if (outcome.kind === "analysed") analysed.push(outcome);
        else complain(`${outcome.name}: ${outcome.sentence}`);
      }
    } catch (error) {
      complain(`${path.basename(file)}: ${sentenceOf(error)}`);
    }
  }
  return analysed;
}

/** One object for one file, an array for several files or for an archive of several; nothing when all are refused. */
function printJson(analysed: readonly Analysed[], files: number): void {
  const results = analysed.map(({ name, analysis }) => resultShape(name, analysis));
  const printed = files > 1 || results.length > 1 ? results : results[0];
  if (printed) process.stdout.write(`${JSON.stringify(printed, null, 1)}\n`);
}

async function main(): Promise<void> {
  const { values, positionals } = parseArgs({
    allowPositionals: true,
    options: { input: { type: "string" }, json: { type: "boolean", default: false } },
  });
  if (positionals.length === 0) return complain(usage);
  const input = await inputOf(values.input);
  const analysed = await analyseAll(positionals, input);
  if (values.json) return printJson(analysed, positionals.length);
  const offset = typeof input.utcOffsetH === "number" ? input.utcOffsetH : 0;
  for (const { name, analysis } of analysed) {
    process.stdout.write(`${describeAnalysis(name, analysis, offset)}\n`);
  }
}

main().catch((error: unknown) => complain(sentenceOf(error)));
