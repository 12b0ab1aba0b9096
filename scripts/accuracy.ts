/** npm run -s accuracy -- [--receivers NAME,...] [--seeds N] [--minutes N] [--by receiver|kind] [--write FILE.json]: figures against the truth of made sessions. */
import { writeFile } from "node:fs/promises";
import process from "node:process";
import { parseArgs } from "node:util";
import { ANALYSIS_VERSION } from "@/lib/analysis/analysis";
import { type Scored, scoreCorpus } from "@/tests/support/accuracy/corpus";
import { accuracyTable, cellOf, coverageOf, FIGURES, STATED } from "@/tests/support/accuracy/table";
import { RECEIVERS } from "@/tests/support/sea/receivers";
import { SESSION_KINDS } from "@/tests/support/sea/sessions";

const usage =
  "usage: npm run -s accuracy -- [--receivers NAME,...] [--seeds N] [--minutes N] [--by receiver|kind] [--write FILE.json]";

/** Of the kinds a rider has most, more sessions: five downwinders and four of a wing to one of each other kind. */
const WEIGHTS = { downwind: 5, wing: 4, coastdown: 1, pause: 1, shuttle: 1 } as const;
const FIRST_SEED = 301;

function ridesOf(times: number) {
  let seed = FIRST_SEED;
  return SESSION_KINDS.flatMap((kind) =>
    Array.from({ length: WEIGHTS[kind] * times }, () => ({ kind, seed: seed++ })),
  );
}

/** What the handbook shows: medians, 90th percentiles and coverage by receiver. */
function forHandbook(scored: readonly Scored[]) {
  const receivers = [...new Set(scored.map((s) => s.receiver))].map((name) => {
    const of = scored.filter((s) => s.receiver === name);
    const figures = Object.fromEntries(FIGURES.map((figure) => [figure, cellOf(of, figure)]));
    const stated = Object.fromEntries(STATED.map((figure) => [figure, coverageOf(of, figure)]));
    return { name, figures, stated, all: coverageOf(of, null) };
  });
  return { analysisVersion: ANALYSIS_VERSION, date: new Date().toISOString().slice(0, 10), receivers };
}

const round = (_: string, value: unknown) =>
  typeof value === "number" ? Number(value.toPrecision(3)) : value;

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      receivers: { type: "string" },
      seeds: { type: "string", default: "1" },
      minutes: { type: "string", default: "25" },
      by: { type: "string", default: "receiver" },
      write: { type: "string" },
    },
  });
  const receivers = values.receivers?.split(",") ?? RECEIVERS.map((r) => r.name);
  const unknown = receivers.filter((name) => !RECEIVERS.some((r) => r.name === name));
  const times = Number(values.seeds);
  const minutes = Number(values.minutes);
  const { by } = values;
  if (unknown.length > 0 || !(times >= 1) || !(minutes >= 5) || (by !== "receiver" && by !== "kind")) {
    process.exitCode = 1;
    process.stderr.write(`${usage}\nreceivers: ${RECEIVERS.map((r) => r.name).join(", ")}\n`);
    return;
  }
  const scored = scoreCorpus({ rides: ridesOf(times), receivers, minutes });
  process.stdout.write(`analysis version ${ANALYSIS_VERSION}\n${accuracyTable(scored, (s) => s[by])}\n`);
  if (values.write) await writeFile(values.write, `${JSON.stringify(forHandbook(scored), round, 1)}\n`);
}

main().catch((error: unknown) => {
  process.exitCode = 1;
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
});
