import type { Metadata } from "next";
import { PageHeader } from "@/components/ui/page-header";
import { Tabs } from "@/components/ui/tabs";
import { PART_KIND_NAMES, PART_KINDS } from "@/lib/gear/dimension-fields";
import { savePartAction } from "@/app/(app)/quiver/actions";
import { PartForm } from "@/app/(app)/quiver/_components/part-form";

export const metadata: Metadata = { title: "New part" };

export default async function NewPartPage({ searchParams }: PageProps<"/quiver/parts/new">) {
  const asked = (await searchParams).kind;
  const kind = PART_KINDS.find((known) => known === asked) ?? "front_wing";
  return (
    <>
      <PageHeader title="New part" subtitle="What is printed on it is enough; the rest can be added later." />
      <Tabs
        label="Kind of part"
        tabs={PART_KINDS.map((known) => ({
          href: `/quiver/parts/new?kind=${known}`,
          label: PART_KIND_NAMES[known],
          current: known === kind,
        }))}
      />
      <div className="mt-8">
        <PartForm key={kind} kind={kind} initial={{}} save={savePartAction} />
      </div>
    </>
  );
}
