import { Table, Td, Th, Tr } from "@/components/ui/table";
import { DEFAULT_READ_LIMITS } from "@/lib/formats/read-limits";
import {
  FILE_BYTES_MAX,
  FILES_AT_ONCE_MAX,
  QUOTA_BYTES,
  UPLOADS_PER_DAY,
  UPLOADS_PER_HOUR,
} from "@/lib/server/uploads/upload-limits";
import type { Chapter } from "./chapter";

const whole = (value: number) => value.toLocaleString("en-GB").replaceAll(",", "\u00a0");

const FORMATS = [
  ["GPX 1.0 and 1.1", "Places, times, height; heart rate and speed where the file has them"],
  ["TCX", "Places, times, height, heart rate"],
  ["KML", "Tracks with times; lines without times cannot be read"],
  ["FIT", "Places, times, height, heart rate, the receiver’s own speed"],
  ["gzip of any of these", "Unpacked on the way"],
  ["zip of several", "Each file inside for itself"],
] as const;

const LIMITS: readonly (readonly [string, string, string])[] = [
  ["One file as it is sent", whole(FILE_BYTES_MAX / 1_000_000), "MB"],
  ["Files at once", whole(FILES_AT_ONCE_MAX), ""],
  ["One upload unpacked", whole(DEFAULT_READ_LIMITS.unpackedBytes / 1024 / 1024), "MB"],
  ["Fixes of one upload", whole(DEFAULT_READ_LIMITS.fixes), ""],
  ["Files in an hour, in a day", `${whole(UPLOADS_PER_HOUR.free)}, ${whole(UPLOADS_PER_DAY.free)}`, ""],
  ["All files of one account", whole(QUOTA_BYTES / 1_000_000_000), "GB"],
];

export const formatsChapter: Chapter = {
  slug: "formats",
  title: "Files and limits",
  summary: "Which files can be read, how large they may be, and what happens to the same file twice.",
  sections: [
    {
      id: "formats",
      title: "Files that can be read",
      body: (
        <Table caption="File formats">
          <thead>
            <tr>
              <Th>Format</Th>
              <Th>What is taken from it</Th>
            </tr>
          </thead>
          <tbody>
            {FORMATS.map(([format, taken]) => (
              <Tr key={format}>
                <Th scope="row">{format}</Th>
                <Td>{taken}</Td>
              </Tr>
            ))}
          </tbody>
        </Table>
      ),
    },
    {
      id: "limits",
      title: "Limits",
      body: (
        <Table caption="Limits of an upload">
          <thead>
            <tr>
              <Th>What</Th>
              <Th numeric>At most</Th>
            </tr>
          </thead>
          <tbody>
            {LIMITS.map(([what, most, unit]) => (
              <Tr key={what}>
                <Th scope="row">{what}</Th>
                <Td numeric>
                  {most}
                  {unit && <span className="unit">{`\u00a0${unit}`}</span>}
                </Td>
              </Tr>
            ))}
          </tbody>
        </Table>
      ),
    },
    {
      id: "twice",
      title: "The same file twice",
      body: (
        <p>
          A file is known by its content, not by its name. The same bytes sent again make no second session:
          the answer leads to the one that is there.
        </p>
      ),
    },
    {
      id: "refused",
      title: "Why a file is refused",
      body: (
        <ul>
          <li>
            It holds a planned route or places without times: there is nothing to work a speed out from.
          </li>
          <li>It is damaged or cut off. Export it again from the watch.</li>
          <li>It is something else under a track’s name, such as a picture or a web page.</li>
          <li>It is past one of the limits above.</li>
        </ul>
      ),
    },
  ],
};
