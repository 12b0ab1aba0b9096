import type { Metadata } from "next";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { PageHeader } from "@/components/ui/page-header";
import { PART_KIND_NAMES } from "@/lib/gear/dimension-fields";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { getPart } from "@/lib/server/gear/read-gear";
import { retirePartAction, savePartAction } from "@/app/(app)/quiver/actions";
import { partValues } from "@/app/(app)/quiver/_components/form-values";
import { PartForm } from "@/app/(app)/quiver/_components/part-form";

export const metadata: Metadata = { title: "Part" };

export default async function PartPage({ params }: PageProps<"/quiver/parts/[partId]">) {
  const { partId } = await params;
  const ctx = await requestContext();
  const part = await pageRead(`/quiver/parts/${partId}`, () => getPart(ctx, partId));
  const retired = part.retiredAtMs !== null;
  const retire = (
    <form action={retirePartAction}>
      <input type="hidden" name="partId" value={part.id} />
      <input type="hidden" name="retired" value={retired ? "0" : "1"} />
      <Button type="submit">{retired ? "Take back into use" : "Retire"}</Button>
    </form>
  );
  return (
    <>
      <PageHeader
        title={`${part.maker} ${part.model}`}
        subtitle={PART_KIND_NAMES[part.kind]}
        actions={retire}
      />
      {retired && (
        <Notice kind="info">Retired: it keeps its history and is not offered for new setups.</Notice>
      )}
      <div className="mt-8">
        <PartForm kind={part.kind} partId={part.id} initial={partValues(part)} save={savePartAction} />
      </div>
    </>
  );
}
