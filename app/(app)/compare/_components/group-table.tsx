import { Table, Td, Th, Tr } from "@/components/ui/table";
import { formatDuration } from "@/lib/display/format-duration";
import { formatNumber, MISSING } from "@/lib/display/format-number";
import type { ComparedGroup } from "@/lib/server/compare/compare-gear";
import type { ShownFigure } from "./figure-panel";

/** The same as the dots, to read and to copy: median, and the middle half behind it. */
export function GroupTable(props: {
  one: string;
  groups: readonly ComparedGroup[];
  figures: readonly ShownFigure[];
}) {
  const { one, groups, figures } = props;
  return (
    <Table caption={`${one} by ${one}: medians and the middle half`}>
      <thead>
        <Tr>
          <Th className="bg-paper sticky left-0">{one}</Th>
          <Th numeric>Sessions</Th>
          <Th numeric>Days</Th>
          <Th numeric>On foil</Th>
          {figures.map((shown) => (
            <Th key={shown.figure} numeric unit={shown.unit}>
              {shown.title}
            </Th>
          ))}
        </Tr>
      </thead>
      <tbody>
        {groups.map((group) => (
          <Tr key={group.key}>
            <Th scope="row" className="bg-paper sticky left-0 min-w-28">
              {group.name}
            </Th>
            <Td numeric>{group.sessions}</Td>
            <Td numeric>{group.days}</Td>
            <Td numeric>{formatDuration(group.onFoilTimeS)}</Td>
            {figures.map((shown) => {
              const spread = group.figures[shown.figure];
              const text = (value: number) => formatNumber(shown.convert(value), shown.decimals);
              return (
                <Td key={shown.figure} numeric className="whitespace-nowrap">
                  {spread === null ? MISSING : text(spread.median)}
                  {spread !== null && spread.count > 1 && (
                    <span className="unit">
                      {" "}
                      {text(spread.low)} to {text(spread.high)}
                    </span>
                  )}
                </Td>
              );
            })}
          </Tr>
        ))}
      </tbody>
    </Table>
  );
}
