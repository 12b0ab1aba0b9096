import { createReadStream } from "node:fs";
import path from "node:path";
import { analyse } from "@/lib/analysis/analyse";
import type { Analysis } from "@/lib/analysis/analysis";
import { readFile } from "@/lib/formats/read-file";
import { disciplineOf, type SessionInput } from "./result-shape";

export type FileAnalysis =
  | { readonly kind: "analysed"; readonly name: string; readonly analysis: Analysis }
  | { readonly kind: "refused"; readonly name: string; readonly sentence: string };

/** Reads and analyses a file as the app does; one outcome for each track in it. */
export async function analyseFile(file: string, input: SessionInput): Promise<FileAnalysis[]> {
  const bytes = createReadStream(file, { highWaterMark: 256 * 1024 });
  const outcomes = await readFile(bytes, { fileName: path.basename(file) });
  return outcomes.map((outcome) => {
    const { name } = outcome;
    if (outcome.kind === "refused") return { kind: "refused", name, sentence: outcome.error.message };
    const analysis = analyse(outcome.fixes, {
      discipline: disciplineOf(input.sport),
      trim: null,
      minimumFlyingSpeedMps: null,
    });
    const notes = [...outcome.notes, ...analysis.quality.notes];
    const quality = { ...analysis.quality, notes };
    return {
      kind: "analysed",
      name,
      analysis: { ...analysis, rawSegments: outcome.rawSegments, quality },
    };
  });
}
