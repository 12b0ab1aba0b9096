import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/section";
import type { ComparedGroup } from "@/lib/server/compare/compare-gear";
import type { SpeedUnit } from "@/lib/units/speed";
import { FigurePanel, shownFigures } from "./figure-panel";
import { GroupTable } from "./group-table";

/** The comparison: what it cannot say first, then four figures as dots and all of them as a table. */
export function Comparison(props: {
  groups: readonly ComparedGroup[];
  one: string;
  speed: SpeedUnit;
  narrowed: boolean;
}) {
  const { groups, one, speed, narrowed } = props;
  if (groups.length === 0) {
    return narrowed ? (
      <EmptyState
        kind="none"
        title="No tagged session fits the filter"
        action={<LinkButton href="/compare">Clear the filter</LinkButton>}
      />
    ) : (
      <EmptyState
        kind="first"
        title="Nothing to compare yet"
        action={<LinkButton href="/sessions">Choose a session to tag</LinkButton>}
      >
        Tag your sessions with the setup you rode. Two setups with a few sessions each make a first picture.
      </EmptyState>
    );
  }
  const figures = shownFigures(speed);
  return (
    <>
      <Notice kind="info" title="What this cannot say">
        These are plain medians of what was ridden. A setup kept for windy days looks fast because the days
        were. Rider’s form, wind, sea and the order within a day are not taken out, and few sessions move a
        median a lot. A difference smaller than the spread says nothing; ride two setups on the same day,
        changing one thing, before believing it.
      </Notice>
      <div className="grid gap-x-10 lg:grid-cols-2">
        {figures.map((shown) => (
          <FigurePanel key={shown.figure} shown={shown} groups={groups} />
        ))}
      </div>
      <Section
        id="table"
        title="As a table"
        reading="Median, and behind it from where to where the middle half lies."
      >
        <GroupTable one={one} groups={groups} figures={figures} />
      </Section>
    </>
  );
}
