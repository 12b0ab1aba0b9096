import { Notice } from "@/components/ui/notice";
import type { DistanceUnit } from "@/lib/units/length";
import type { PlainUpload } from "./upload-actions";
import { VerdictLine, verdictStatus } from "./verdict-line";

/** What came of files that were sent with the page's form, without JavaScript. */
export function PlainResults({ upload, unit }: { upload: PlainUpload; unit: DistanceUnit }) {
  if (upload.problem !== "") {
    return (
      <Notice kind="problem" className="mt-4">
        {upload.problem}
      </Notice>
    );
  }
  if (upload.files.length === 0) return null;
  return (
    <ul aria-label="Files sent" className="rule-ink mt-6">
      {upload.files.map(({ name, problem, verdicts }, index) => (
        <li key={`${index}-${name}`} className="rule-hair py-3">
          <div className="flex items-baseline justify-between gap-4">
            <p className="min-w-0 font-semibold break-words">{name}</p>
            <p className="num shrink-0 text-sm">{problem === "" ? verdictStatus(verdicts) : "not read"}</p>
          </div>
          {problem !== "" && <p className="text-muted mt-1 text-sm">{problem}</p>}
          {verdicts.map((verdict) => (
            <VerdictLine
              key={`${verdict.entryName}-${verdict.kind}`}
              verdict={verdict}
              unit={unit}
              isArchive={verdicts.length > 1 || verdict.entryName !== ""}
            />
          ))}
        </li>
      ))}
    </ul>
  );
}
