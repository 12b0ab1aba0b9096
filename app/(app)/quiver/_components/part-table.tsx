import Link from "next/link";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import { PART_KIND_NAMES } from "@/lib/gear/dimension-fields";
import type { getPart } from "@/lib/server/gear/read-gear";
import { partSummary } from "./form-values";

/** Parts with the dimensions that tell them apart. */
export function PartTable(props: { caption: string; parts: readonly Awaited<ReturnType<typeof getPart>>[] }) {
  if (props.parts.length === 0) return <p className="text-muted rule-ink py-3">Every part is retired.</p>;
  return (
    <Table caption={props.caption}>
      <thead>
        <Tr>
          <Th>Part</Th>
          <Th>Kind</Th>
          <Th>Dimensions</Th>
        </Tr>
      </thead>
      <tbody>
        {props.parts.map((part) => (
          <Tr key={part.id}>
            <Th scope="row">
              <Link className="link" href={`/quiver/parts/${part.id}`}>
                {part.maker} {part.model}
              </Link>
            </Th>
            <Td>{PART_KIND_NAMES[part.kind]}</Td>
            <Td>{partSummary(part) || "–"}</Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
