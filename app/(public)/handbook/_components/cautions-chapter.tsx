import { CAUTIONS } from "@/components/shell/cautions";
import type { Chapter } from "./chapter";

export const cautionsChapter: Chapter = {
  slug: "cautions",
  title: "Cautions",
  summary: "Before you go out, before you change the trim, and before you believe a number.",
  sections: [
    {
      id: "water",
      title: "On the water",
      body: (
        <>
          <p>{CAUTIONS.water}</p>
          <p>
            Figures from a past session say nothing about today’s sea. Look at the forecast and at the water,
            tell somebody ashore where you start, where you land and when they should call for help.
          </p>
        </>
      ),
    },
    { id: "trim", title: "On trim and lift", body: <p>{CAUTIONS.trim}</p> },
    { id: "speed", title: "On speeds", body: <p>{CAUTIONS.speed}</p> },
  ],
};
