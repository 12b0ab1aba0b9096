import type { Metadata } from "next";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { Section } from "@/components/ui/section";
import { requestContext } from "@/lib/server/adapter/request-context";
import { pageRead } from "@/lib/server/adapter/page";
import { listParts, listSetups } from "@/lib/server/gear/read-gear";
import { PartTable } from "./_components/part-table";
import { RetiredGear } from "./_components/retired-gear";
import { SavedNotice } from "./_components/saved-notice";
import { SetupTable } from "./_components/setup-table";

export const metadata: Metadata = { title: "Quiver" };

export default async function QuiverPage({ searchParams }: PageProps<"/quiver">) {
  const { saved } = await searchParams;
  const ctx = await requestContext();
  const [parts, setups] = await pageRead("/quiver", () => Promise.all([listParts(ctx), listSetups(ctx)]));
  const names = new Map(parts.map((part) => [part.id, `${part.maker} ${part.model}`]));
  const inUse = <T extends { retiredAtMs: number | null }>(row: T) => row.retiredAtMs === null;
  const isRetired = <T extends { retiredAtMs: number | null }>(row: T) => !inUse(row);
  const newPart = <LinkButton href="/quiver/parts/new">Add a part</LinkButton>;
  const newSetup = (
    <LinkButton look="main" href="/quiver/setups/new">
      New setup
    </LinkButton>
  );
  return (
    <>
      <PageHeader
        title="Quiver"
        subtitle="Your parts, and how they are bolted together."
        actions={parts.length > 0 && newSetup}
      />
      <SavedNotice saved={saved} />
      <Section
        id="setups"
        title="Setups"
        reading="Copy one and change one thing: that is what can be compared."
      >
        {setups.some(inUse) ? (
          <SetupTable caption="Setups in use" setups={setups.filter(inUse)} partNames={names} />
        ) : (
          <EmptyState kind="first" title="No setup yet" action={parts.length > 0 ? newSetup : newPart}>
            {parts.length > 0
              ? "Bolt your parts together into a setup; sessions are then tagged with it."
              : "Start with your front wing: a setup is made of parts."}
          </EmptyState>
        )}
      </Section>
      {parts.length > 0 && (
        <Section id="parts" title="Parts" actions={newPart}>
          <PartTable caption="Parts in use" parts={parts.filter(inUse)} />
        </Section>
      )}
      <RetiredGear parts={parts.filter(isRetired)} setups={setups.filter(isRetired)} partNames={names} />
    </>
  );
}
