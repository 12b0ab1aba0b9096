import type { TrackNote } from "@/lib/track/fixes";

/** Everything a reader may have to say about a file it read. */
export type ReadNoteCode =
  | "no_time"
  | "bad_time"
  | "clock_not_set"
  | "no_position"
  | "bad_position"
  | "out_of_range"
  | "zero_position"
  | "bad_values"
  | "zone_missing"
  | "waypoints_ignored"
  | "routes_ignored"
  | "lines_ignored"
  | "counts_differ"
  | "namespace_missing"
  | "prefix_undeclared"
  | "encoding_repaired"
  | "checksum"
  | "cut_short";

type Words = { readonly one: string; readonly many: string };

const dropped = (reason: string): Words => ({
  one: `1 fix ${reason} and was left out.`,
  many: `# fixes ${reason} and were left out.`,
});
const always = (text: string): Words => ({ one: text, many: text });

const WORDS: Readonly<Record<ReadNoteCode, Words>> = {
  no_time: dropped("had no time"),
  bad_time: dropped("had a time that cannot be read"),
  clock_not_set: dropped("had a date before satellite navigation or far in the future (clock not set yet)"),
  no_position: dropped("had no position"),
  bad_position: dropped("had a position that is not a number"),
  out_of_range: dropped("had a latitude or longitude that does not exist"),
  zero_position: dropped("had the position 0, 0 that a receiver writes before it knows where it is"),
  bad_values: {
    one: "1 elevation, heart rate, speed or signal value was impossible and was left out; the fix was kept.",
    many: "# elevation, heart rate, speed or signal values were impossible and were left out; the fixes were kept.",
  },
  zone_missing: {
    one: "1 time names no zone and was read as UTC.",
    many: "# times name no zone and were read as UTC.",
  },
  waypoints_ignored: {
    one: "1 waypoint was ignored: it is a place, not a recording.",
    many: "# waypoints were ignored: they are places, not a recording.",
  },
  routes_ignored: {
    one: "1 route or course was ignored: it is a plan, not a recording.",
    many: "# routes or courses were ignored: they are plans, not a recording.",
  },
  lines_ignored: {
    one: "1 line without times was ignored.",
    many: "# lines without times were ignored.",
  },
  counts_differ: {
    one: "1 time or position had no partner and was left out.",
    many: "# times or positions had no partner and were left out.",
  },
  namespace_missing: always(
    "The file does not say which kind of GPX, TCX or KML it is; it was read by its tag names.",
  ),
  prefix_undeclared: always(
    "The file uses tag prefixes that it never declares; it was read by its tag names.",
  ),
  encoding_repaired: always(
    "The file is not in the character encoding it claims; the track itself is not affected.",
  ),
  checksum: always("The checksum of the file does not fit: some bytes may have changed on the way."),
  cut_short: always("The file is damaged or was cut short; everything whole before that was read."),
};

/**
 * The tally of what was dropped, repaired or ignored, and its sentences.
 *
 * Shapes: `add` counts, `list` gives one note for each code that was met, in a fixed order. Errors: none.
 *
 * @example
 * new TrackNotes().list().length; // 0
 */
export class TrackNotes {
  private readonly counts = new Map<ReadNoteCode, number>();

  add(code: ReadNoteCode, count = 1): void {
    if (count > 0) this.counts.set(code, (this.counts.get(code) ?? 0) + count);
  }

  count(code: ReadNoteCode): number {
    return this.counts.get(code) ?? 0;
  }

  list(): TrackNote[] {
    const notes: TrackNote[] = [];
    for (const [code, words] of Object.entries(WORDS)) {
      const count = this.counts.get(code as ReadNoteCode);
      if (count === undefined) continue;
      const text = (count === 1 ? words.one : words.many).replace("#", count.toLocaleString("en"));
      notes.push({ code, count, text });
    }
    return notes;
  }
}
