import Link from "next/link";
import { LinkButton } from "@/components/ui/link-button";
import { Table, Td, Th, Tr } from "@/components/ui/table";
import { formatDate } from "@/lib/display/format-time";
import { describeMastPosition, describeShim } from "@/lib/gear/describe-setup";
import type { SetupWithUse } from "@/lib/server/gear/read-gear";

/** The rider's setups: what is bolted together, how often it was ridden, and a way to copy it. */
export function SetupTable(props: {
  caption: string;
  setups: readonly SetupWithUse[];
  partNames: ReadonlyMap<string, string>;
}) {
  const { caption, setups, partNames } = props;
  const name = (id: string | null) => (id === null ? "–" : (partNames.get(id) ?? "–"));
  return (
    <Table caption={caption}>
      <thead>
        <Tr>
          <Th>Setup</Th>
          <Th>Front wing</Th>
          <Th>Rear wing</Th>
          <Th>Adjustments</Th>
          <Th numeric>Ridden</Th>
          <Th>Last</Th>
          <Th>Next</Th>
        </Tr>
      </thead>
      <tbody>
        {setups.map((setup) => (
          <Tr key={setup.id}>
            <Th scope="row" className="min-w-32">
              <Link className="link" href={`/quiver/setups/${setup.id}`}>
                {setup.name}
              </Link>
            </Th>
            <Td className="min-w-28">{name(setup.frontWingId)}</Td>
            <Td className="min-w-28">{name(setup.rearWingId)}</Td>
            <Td className="min-w-36">
              {[describeMastPosition(setup.mastPositionMm), describeShim(setup.shimStackDeg)]
                .filter((words) => words !== null)
                .join(", ")}
            </Td>
            <Td numeric>{setup.spans}</Td>
            <Td className="whitespace-nowrap">
              {setup.lastRiddenMs === null ? "never" : formatDate(setup.lastRiddenMs, "UTC")}
            </Td>
            <Td>
              <LinkButton
                size="small"
                href={`/quiver/setups/new?copy=${setup.id}`}
                aria-label={`Copy ${setup.name} and change one thing`}
              >
                Copy
              </LinkButton>
            </Td>
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
