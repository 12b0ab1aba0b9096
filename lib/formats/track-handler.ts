import type { ParseError } from "@/lib/errors/parse-error";
import type { FixConverter } from "./fix-draft";
import { FixSink } from "./fix-sink";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import type { TagHandler, TagName } from "./xml-tokenizer";

/** Names of places and sessions longer than this are cut. */
const TITLE_LENGTH_MAX = 200;
/** No value of a fix and no line that a time span can place is longer; the rest of a text is let go. */
export const GATHERED_MAX = 64 * 1024;

/**
 * What GPX, TCX and KML have in common: one text is gathered at a time, namespaces are looked at only to say
 * what is missing, fixes go through the sink.
 */
export abstract class TrackHandler implements TagHandler {
  abstract readonly format: "gpx" | "tcx" | "kml";
  readonly sink: FixSink;
  title: string | null = null;
  /** Recorded segments in the file that hold a point at all, usable or not. */
  rawSegments = 0;
  wantsText = false;
  protected gathered = "";
  private readonly declared = new Set(["xml", "xmlns"]);
  private prefixSeen = "";

  constructor(convert: FixConverter, budget: ReadBudget) {
    this.sink = new FixSink(convert, budget);
  }

  abstract codeOf(local: string): number;
  abstract open(name: TagName, attributes: readonly string[], depth: number): void;
  abstract close(name: TagName, depth: number): void;
  /** Why a file whose tags were fine gives no track; null when the sink's own tally explains it. */
  protected abstract planOnly(): ParseError | null;

  text(text: string): void {
    if (this.gathered.length + text.length > GATHERED_MAX) {
      this.gathered = (this.gathered + text.slice(0, GATHERED_MAX)).slice(0, GATHERED_MAX);
      return;
    }
    this.gathered = this.gathered === "" ? text : this.gathered + text;
  }

  /** The refusal for a whole file without a single usable fix. */
  whyEmpty(): ParseError {
    const { notes } = this.sink;
    const untimed = notes.count("no_time") + notes.count("bad_time") + notes.count("clock_not_set");
    const misplaced =
      notes.count("bad_position") + notes.count("out_of_range") + notes.count("zero_position");
    if (untimed > 0) return this.whyUntimed();
    const plan = this.planOnly();
    if (plan !== null) return plan;
    if (misplaced + notes.count("no_position") > 0) {
      return refusal("no_track", {
        format: this.format,
        found: "Not one of its points has a usable position",
      });
    }
    return refusal("no_track", { format: this.format });
  }

  /** Notes a missing namespace on the root. */
  protected lookAtRoot(name: TagName, attributes: readonly string[]): void {
    this.lookAtNames(name, attributes);
    const wanted = name.prefix === "" ? "xmlns" : `xmlns:${name.prefix}`;
    for (let at = 0; at < attributes.length; at += 2) if (attributes[at] === wanted) return;
    if (name.prefix === "") this.sink.notes.add("namespace_missing");
  }

  /** Collects declared prefixes and notes the first use of an undeclared one. */
  protected lookAtNames(name: TagName, attributes: readonly string[]): void {
    for (let at = 0; at < attributes.length; at += 2) {
      const attribute = attributes[at] ?? "";
      if (attribute.startsWith("xmlns:") && this.declared.size < 256) this.declared.add(attribute.slice(6));
    }
    if (name.prefix === "" || name.prefix === this.prefixSeen) return;
    this.prefixSeen = name.prefix;
    if (!this.declared.has(name.prefix) && this.sink.notes.count("prefix_undeclared") === 0) {
      this.sink.notes.add("prefix_undeclared");
    }
  }

  /** The gathered text as a title: one line, no control characters, cut to a readable length. */
  protected takeTitle(): void {
    const title = this.gathered.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, " ").trim();
    if (this.title === null && title !== "")
      this.title = Array.from(title).slice(0, TITLE_LENGTH_MAX).join("");
  }

  private whyUntimed(): ParseError {
    const { notes } = this.sink;
    const untimed = notes.count("no_time");
    const unset = notes.count("clock_not_set");
    const found =
      untimed > 0
        ? "It holds a track without times"
        : unset > 0
          ? "The clock of the receiver was never set: its dates are impossible"
          : "Its times are written in a way that cannot be read";
    return refusal("no_times", { format: this.format, found });
  }
}
