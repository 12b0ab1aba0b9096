import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Disclosure } from "@/components/ui/disclosure";
import { verdictWords, type FileVerdict } from "@/lib/display/file-verdict";
import { formatDateTime } from "@/lib/display/format-time";
import type { DistanceUnit } from "@/lib/units/length";

/** One word for what became of a file as a whole. */
export function verdictStatus(verdicts: readonly FileVerdict[]): string {
  const read = verdicts.filter(({ kind }) => kind === "read").length;
  if (verdicts.length > 1) return `${read} of ${verdicts.length} read`;
  const kind = verdicts[0]?.kind ?? "refused";
  return { read: "read", already: "in your log", deleted: "deleted", refused: "not read" }[kind];
}

/** What became of one track, with the way to its session. */
export function VerdictLine({
  verdict,
  unit,
  isArchive,
  onRestore,
}: {
  verdict: FileVerdict;
  unit: DistanceUnit;
  isArchive: boolean;
  /** Left out where nothing can be pressed (no JavaScript). */
  onRestore?: (sessionId: string) => void;
}) {
  return (
    <div className="mt-1 text-sm">
      {isArchive && <p className="font-semibold break-words">{verdict.entryName}</p>}
      <p className="text-muted">
        {verdict.kind === "read" && `${formatDateTime(verdict.startMs, verdict.timeZone)}. `}
        {verdictWords(verdict, unit)}
      </p>
      {verdict.kind === "read" && <CleaningNotes notes={verdict.notes} />}
      {verdict.kind === "read" && verdict.sameAs !== null && (
        <p className="text-muted">
          It begins and ends when{" "}
          <Link className="link" href={`/sessions/${verdict.sameAs.sessionId}`}>
            {verdict.sameAs.title}
          </Link>{" "}
          does. Both are kept; delete the one you do not need.
        </p>
      )}
      {verdict.kind !== "refused" && (
        <p className="mt-1 flex flex-wrap items-center gap-x-6 gap-y-1">
          {verdict.kind === "deleted" ? (
            <span className="font-semibold">{verdict.title}</span>
          ) : (
            <Link
              className="link inline-flex min-h-6 items-center font-semibold"
              href={`/sessions/${verdict.sessionId}`}
            >
              {verdict.title}
            </Link>
          )}
          {verdict.kind === "deleted" && onRestore !== undefined && (
            <Button look="quiet" size="small" onClick={() => onRestore(verdict.sessionId)}>
              Bring it back
            </Button>
          )}
        </p>
      )}
    </div>
  );
}

function CleaningNotes({ notes }: { notes: readonly string[] }) {
  if (notes.length === 0) return null;
  if (notes.length <= 2) return <p className="text-muted">{notes.join(" ")}</p>;
  return (
    <Disclosure summary={`${notes.length} notes on the recording`}>
      <ul className="text-muted list-[square] pl-4">
        {notes.map((note) => (
          <li key={note}>{note}</li>
        ))}
      </ul>
    </Disclosure>
  );
}
