import { FIGURE_DEFINITIONS, type FigureDefinition, type FigureUnit } from "@/lib/analysis/definitions";
import type { Chapter } from "./chapter";

const UNIT_WORDS: Readonly<Record<FigureUnit, string>> = {
  speed: "kn, km/h, mph or m/s, as you choose",
  distance: "NM, km or mi, as you choose; m when it is short",
  duration: "h:mm:ss",
  share: "per cent",
  count: "a count",
  ratio: "none: metres by metres",
  per_km: "per kilometre",
  per_hour: "per hour",
};

/** What a figure is, how it is worked out, where that comes from, and where it stops being true. */
function FigureText({ figure }: { figure: FigureDefinition }) {
  return (
    <>
      <p>{figure.explanation}</p>
      <dl className="rule-ink">
        {[
          [
            "Formula",
            <span key="formula" className="font-mono text-sm">
              {figure.formula}
            </span>,
          ],
          ["Unit", UNIT_WORDS[figure.unit]],
          ["Limits", figure.limits],
          ["Source", figure.source],
        ].map(([term, words]) => (
          <div key={String(term)} className="rule-hair grid gap-x-4 py-2 sm:grid-cols-[6rem_minmax(0,1fr)]">
            <dt className="text-muted text-sm sm:pt-0.5">{term}</dt>
            <dd>{words}</dd>
          </div>
        ))}
      </dl>
    </>
  );
}

export const figuresChapter: Chapter = {
  slug: "figures",
  title: "The figures",
  summary: "Every figure of a session: what it is, its formula, its source and its limits.",
  sections: FIGURE_DEFINITIONS.map((figure) => ({
    id: figure.key,
    title: figure.name,
    body: <FigureText figure={figure} />,
  })),
};
