import type { Metadata } from "next";
import { Button } from "@/components/ui/button";
import { LinkButton } from "@/components/ui/link-button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { SETUP_PART_COLUMNS } from "@/lib/gear/part-schema";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { getSetup, listParts } from "@/lib/server/gear/read-gear";
import { retireSetupAction, saveSetupAction } from "@/app/(app)/quiver/actions";
import { partChoices, setupValues } from "@/app/(app)/quiver/_components/form-values";
import { SetupForm } from "@/app/(app)/quiver/_components/setup-form";

export const metadata: Metadata = { title: "Setup" };

export default async function SetupPage({ params }: PageProps<"/quiver/setups/[setupId]">) {
  const { setupId } = await params;
  const ctx = await requestContext();
  const path = `/quiver/setups/${setupId}`;
  const [setup, parts] = await pageRead(path, () => Promise.all([getSetup(ctx, setupId), listParts(ctx)]));
  const retired = setup.retiredAtMs !== null;
  const choices = partChoices(
    parts,
    SETUP_PART_COLUMNS.map(([column]) => setup[column] ?? ""),
  );
  const actions = (
    <>
      <LinkButton href={`/sessions?setup=${setup.id}`}>Sessions ridden on it</LinkButton>
      <LinkButton href={`/quiver/setups/new?copy=${setup.id}`}>Copy and change one thing</LinkButton>
      <form action={retireSetupAction}>
        <input type="hidden" name="setupId" value={setup.id} />
        <input type="hidden" name="retired" value={retired ? "0" : "1"} />
        <Button type="submit">{retired ? "Take back into use" : "Retire"}</Button>
      </form>
    </>
  );
  return (
    <>
      <PageHeader title={setup.name} subtitle="What is bolted together, and how." actions={actions} />
      <Notice kind="info">
        {retired
          ? "Retired: it keeps its history and is not offered at upload."
          : "A change here also changes what past sessions say was ridden. To try something new, copy it."}
      </Notice>
      <div className="mt-8">
        <SetupForm setupId={setup.id} choices={choices} initial={setupValues(setup)} save={saveSetupAction} />
      </div>
    </>
  );
}
