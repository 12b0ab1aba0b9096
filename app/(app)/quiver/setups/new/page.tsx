import type { Metadata } from "next";
import { EmptyState } from "@/components/ui/empty-state";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { getSetup, listParts } from "@/lib/server/gear/read-gear";
import { SETUP_PART_COLUMNS } from "@/lib/gear/part-schema";
import { saveSetupAction } from "@/app/(app)/quiver/actions";
import { partChoices, setupValues } from "@/app/(app)/quiver/_components/form-values";
import { SetupForm } from "@/app/(app)/quiver/_components/setup-form";

export const metadata: Metadata = { title: "New setup" };

export default async function NewSetupPage({ searchParams }: PageProps<"/quiver/setups/new">) {
  const { copy } = await searchParams;
  const ctx = await requestContext();
  const from = typeof copy === "string" ? await pageRead("/quiver", () => getSetup(ctx, copy)) : null;
  const parts = await pageRead("/quiver/setups/new", () => listParts(ctx));
  const kept = from === null ? [] : SETUP_PART_COLUMNS.map(([column]) => from[column] ?? "");
  const choices = partChoices(parts, kept);
  if (choices.front_wing.length === 0) {
    const action = (
      <LinkButton look="main" href="/quiver/parts/new?kind=front_wing">
        Add a front wing
      </LinkButton>
    );
    return (
      <>
        <PageHeader title="New setup" />
        <EmptyState kind="first" title="A setup starts with a front wing" action={action}>
          There is none in your quiver yet.
        </EmptyState>
      </>
    );
  }
  const initial = from === null ? {} : { ...setupValues(from), name: `${from.name}, changed` };
  const subtitle =
    from === null
      ? "What is bolted together, and how."
      : `A copy of ${from.name}. Change one thing and give it a name that says which.`;
  return (
    <>
      <PageHeader title={from === null ? "New setup" : "Copy and change one thing"} subtitle={subtitle} />
      <SetupForm copiedFromId={from?.id} choices={choices} initial={initial} save={saveSetupAction} />
    </>
  );
}
