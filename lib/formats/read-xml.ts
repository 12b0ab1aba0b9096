import { ParseError } from "@/lib/errors/parse-error";
import { GpxHandler } from "./gpx-handler";
import { KmlHandler } from "./kml-handler";
import type { ReadBudget } from "./read-limits";
import { refusal } from "./refusal";
import { TcxHandler } from "./tcx-handler";
import { TextDecoding } from "./text-decoding";
import type { TrackHandler } from "./track-handler";
import type { TrackRead } from "./track-read";
import { XmlTokenizer, type TagHandler, type TagName } from "./xml-tokenizer";

/** Listens for the root element and hands over to the reader of its format. */
class RootHandler implements TagHandler {
  readonly wantsText = false;
  track: TrackHandler | null = null;
  private readonly budget: ReadBudget;
  tokenizer: XmlTokenizer | null = null;

  constructor(budget: ReadBudget) {
    this.budget = budget;
  }

  codeOf(): number {
    return 0;
  }

  open(name: TagName, attributes: readonly string[], depth: number): void {
    const track = this.trackFor(name.local);
    this.track = track;
    this.tokenizer?.handOver(track);
    track.open({ ...name, code: track.codeOf(name.local) }, attributes, depth);
  }

  text(): void {}

  close(): void {}

  private trackFor(root: string): TrackHandler {
    if (root === "gpx") return new GpxHandler(this.budget);
    if (root === "TrainingCenterDatabase") return new TcxHandler(this.budget);
    if (root === "kml") return new KmlHandler(this.budget);
    const found = /^html$/i.test(root)
      ? "It holds a web page, not a track"
      : "It is XML, but of another kind";
    throw refusal("unknown_format", { found });
  }
}

/**
 * Reads GPX, TCX or KML as its bytes stream by; the root element decides which.
 *
 * Shapes: `write` takes pieces of bytes cut anywhere, `end` gives the track. A document that breaks off or
 * breaks in the middle is kept up to there, with a note, when enough fixes stand before that.
 * Errors: ParseError of the tokenizer and the sink; `not_well_formed` when too little stands before damage.
 */
export class XmlReader {
  private readonly budget: ReadBudget;
  private readonly root: RootHandler;
  private readonly tokenizer: XmlTokenizer;
  private readonly decoding: TextDecoding;
  private damage: ParseError | null = null;

  constructor(head: Uint8Array, budget: ReadBudget) {
    this.budget = budget;
    this.decoding = new TextDecoding(head);
    this.root = new RootHandler(budget);
    this.tokenizer = new XmlTokenizer(this.root, budget.limits);
    this.root.tokenizer = this.tokenizer;
  }

  /** False once the document is damaged: what follows is not looked at. */
  write(bytes: Uint8Array): boolean {
    if (this.damage === null) this.tokenize(this.decoding.decode(bytes));
    return this.damage === null;
  }

  /** `brokenOff`: the source itself failed before its end (a damaged archive). */
  end(brokenOff = false): TrackRead {
    if (this.damage === null) this.tokenize(this.decoding.end());
    const { track } = this.root;
    const whole = this.damage === null && this.tokenizer.end() && !brokenOff;
    if (track === null)
      throw this.damage ?? refusal("unknown_format", { found: "It holds no track, only fragments of XML" });
    const { sink } = track;
    if (!whole) {
      if (sink.count < this.budget.limits.minFixes) {
        throw refusal("not_well_formed", {
          format: track.format,
          place: this.damage?.place ?? this.tokenizer.place,
        });
      }
      sink.notes.add("cut_short");
    }
    if (this.decoding.repaired) sink.notes.add("encoding_repaired");
    return {
      format: track.format,
      title: track.title,
      sink,
      rawSegments: track.rawSegments,
      whyEmpty: () => track.whyEmpty(),
    };
  }

  private tokenize(text: string): void {
    try {
      this.tokenizer.write(text);
    } catch (error) {
      if (!(error instanceof ParseError) || error.code !== "not_well_formed") throw error;
      this.damage = error;
    }
  }
}
