import type { ParseError } from "@/lib/errors/parse-error";
import type { FixSink } from "./fix-sink";

export type TrackFormat = "gpx" | "tcx" | "kml" | "fit";

/** What a format's reader hands back: the filled sink and what the file says besides. */
export type TrackRead = {
  readonly format: TrackFormat;
  readonly title: string | null;
  readonly sink: FixSink;
  readonly rawSegments: number;
  readonly whyEmpty: () => ParseError;
};
