import { Table, Td, Th, Tr } from "@/components/ui/table";
import { METRES_PER_MILE, METRES_PER_NM } from "@/lib/units/length";
import { MPS_PER_KMH, MPS_PER_KNOT, MPS_PER_MPH } from "@/lib/units/speed";
import type { Chapter } from "./chapter";

const UNITS: readonly (readonly [string, string, string])[] = [
  ["knot, kn", MPS_PER_KNOT.toFixed(6), "m/s"],
  ["kilometre an hour, km/h", MPS_PER_KMH.toFixed(6), "m/s"],
  ["mile an hour, mph", MPS_PER_MPH.toFixed(6), "m/s"],
  ["nautical mile, NM", METRES_PER_NM.toFixed(0), "m"],
  ["mile, mi", METRES_PER_MILE.toFixed(3), "m"],
];

export const unitsChapter: Chapter = {
  slug: "units",
  title: "Units, times and directions",
  summary: "How figures are written, and what a knot is.",
  sections: [
    {
      id: "units",
      title: "Units",
      body: (
        <>
          <p>
            Everything is kept in metres and seconds and turned into your units where it is shown. You choose
            them in the settings; a table never mixes two. One knot is one nautical mile an hour, 1852 m in
            3600 s, exactly.
          </p>
          <Table caption="Units and what they are">
            <thead>
              <tr>
                <Th>Unit</Th>
                <Th numeric>Is</Th>
              </tr>
            </thead>
            <tbody>
              {UNITS.map(([name, value, unit]) => (
                <Tr key={name}>
                  <Th scope="row">{name}</Th>
                  <Td numeric>
                    {value}
                    <span className="unit">{`\u00a0${unit}`}</span>
                  </Td>
                </Tr>
              ))}
            </tbody>
          </Table>
          <p className="text-muted text-sm">
            Sources: SI Brochure, 9th edition (nautical mile, knot); NIST Special Publication 811, 2008
            (mile).
          </p>
        </>
      ),
    },
    {
      id: "numbers",
      title: "Numbers",
      body: (
        <p>
          Speeds have one decimal, distances two; a short distance stands in metres. Where you type a number,
          point and comma both work, and spaces do no harm. A dash is a figure that is missing, with the
          reason beside it.
        </p>
      ),
    },
    {
      id: "times",
      title: "Times",
      body: (
        <p>
          Times are the clock of the place where the session began, 24 hours, days as 14 Jun 2025. Elapsed
          times are h:mm:ss. Files you take out carry the offset from universal time.
        </p>
      ),
    },
    {
      id: "directions",
      title: "Directions",
      body: (
        <p>
          Bearings are true, three digits, 000° to 359°. Wind is where it comes from; current is where it
          goes. The wind arrow points with the flow.
        </p>
      ),
    },
  ],
};
