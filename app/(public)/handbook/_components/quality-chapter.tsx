import { Table, Td, Th, Tr } from "@/components/ui/table";
import { formatShare } from "@/lib/display/format-quantity";
import type { Chapter } from "./chapter";
import { GRADE_LIMITS } from "./grade-limits";

export const qualityChapter: Chapter = {
  slug: "quality",
  title: "Quality grades",
  summary: "What a recording is worth, A to D, why, and what is withheld below B.",
  sections: [
    {
      id: "grades",
      title: "The grades",
      body: (
        <>
          <p>
            A recording is graded by its worst side. The limits are our own choice: at the edge from B to C
            the standard error of a best over two seconds passes about five per cent. A recording that misses
            a limit of C is graded D.
          </p>
          <Table caption="Limits of the quality grades">
            <thead>
              <tr>
                <Th>Grade</Th>
                <Th numeric unit="s">
                  One fix every
                </Th>
                <Th numeric unit="%">
                  Time in gaps
                </Th>
                <Th numeric unit="m">
                  Noise
                </Th>
                <Th numeric unit="%">
                  Fixes dropped
                </Th>
              </tr>
            </thead>
            <tbody>
              {GRADE_LIMITS.map((limit) => (
                <Tr key={limit.grade}>
                  <Th scope="row">{limit.grade}, at most</Th>
                  <Td numeric>{limit.everyS}</Td>
                  <Td numeric>{formatShare(limit.gapShare)}</Td>
                  <Td numeric>{limit.noiseM.toFixed(1)}</Td>
                  <Td numeric>{formatShare(limit.droppedShare)}</Td>
                </Tr>
              ))}
            </tbody>
          </Table>
        </>
      ),
    },
    {
      id: "withheld",
      title: "What is withheld",
      body: (
        <p>
          Below grade B, bests over less than 5 s are not shown: they would say more about the receiver than
          about the rider. A missing figure is a dash with its reason, never a zero.
        </p>
      ),
    },
    {
      id: "better",
      title: "How to get a better recording",
      body: (
        <ul>
          <li>
            Set the watch or receiver to one fix a second or faster, not to the setting that saves battery.
          </li>
          <li>Start it on the beach in the open a minute before you go, and let it settle at rest.</li>
          <li>Wear it high, on the upper arm or the helmet: under water it is blind.</li>
          <li>
            Export the original file. A file that went through another service may have lost points and
            speeds.
          </li>
        </ul>
      ),
    },
  ],
};
