// npm run bench: speed and memory as ratios within one run. Machines are noisy: compare the ratios, not the seconds.
import process from "node:process";
import { benchAnalysis } from "@/tests/bench/analysis";
import { benchDrawing } from "@/tests/bench/drawing";
import { benchReading } from "@/tests/bench/reading";
import { benchStoredTrack } from "@/tests/bench/stored-track";

async function main(): Promise<void> {
  await benchReading();
  await benchStoredTrack();
  await benchAnalysis();
  await benchDrawing();
}

main().catch((error: unknown) => {
  process.stdout.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});
