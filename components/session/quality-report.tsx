import Link from "next/link";
import { FigureList, type Figure } from "@/components/ui/figure-list";
import { formatNumber } from "@/lib/display/format-number";
import { formatShare } from "@/lib/display/format-quantity";
import type { QualityGrade, QualityReport as Quality } from "@/lib/track/quality";

const MEANINGS: Readonly<Record<QualityGrade, string>> = {
  A: "Good for every figure, short bests too.",
  B: "Good for every figure; short bests carry a wider error.",
  C: "Good for distances, times on foil and means; bests are withheld.",
  D: "Good for where and when; read every figure with care. Bests are withheld.",
};

function figuresOf(quality: Quality): Figure[] {
  const dropped = quality.fixesRead - quality.fixesKept;
  return [
    { label: "Recording rate", value: formatNumber(quality.rateHz, 2), unit: "Hz" },
    { label: "Fixes kept", value: formatNumber(quality.fixesKept, 0), note: `of ${quality.fixesRead}` },
    {
      label: "Fixes dropped",
      value: formatNumber(dropped, 0),
      note: quality.spikesDropped > 0 ? `${quality.spikesDropped} of them jumps` : undefined,
    },
    { label: "Gaps", value: formatNumber(quality.gapCount, 0) },
    { label: "Time in gaps", value: formatShare(quality.gapShare, 1), unit: "%" },
    { label: "Noise of the positions", value: formatNumber(quality.noiseM, 1), unit: "m" },
  ];
}

/** What the recording is worth: the grade with its meaning, what keeps it from a better one, what was repaired. */
export function QualityReport({ quality }: { quality: Quality }) {
  return (
    <div className="grid gap-x-10 gap-y-6 md:grid-cols-2">
      <div className="rule-ink flex flex-col gap-3 pt-3">
        <div className="flex items-baseline gap-4">
          <p className="num text-4xl leading-none font-semibold">
            <span className="sr-only">Grade </span>
            {quality.grade}
          </p>
          <p>{MEANINGS[quality.grade]}</p>
        </div>
        <ul className="list-disc pl-5">
          {quality.reasons.map((reason) => (
            <li key={reason}>{reason}</li>
          ))}
          <li>
            {quality.receiverSpeedUsed
              ? "The receiver’s own speed was used beside the positions."
              : "Speed comes from the positions alone."}
          </li>
          {quality.notes.map((note) => (
            <li key={`${note.code} ${note.text}`}>{note.text}</li>
          ))}
        </ul>
        <p className="text-muted text-sm">
          A GPS speed is a measurement with an error.{" "}
          <Link href="/handbook" className="link">
            How every figure is worked out
          </Link>
        </p>
      </div>
      <FigureList figures={figuresOf(quality)} />
    </div>
  );
}
