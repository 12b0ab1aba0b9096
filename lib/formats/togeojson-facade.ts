import { gpx, kml, tcx } from "@tmcw/togeojson";
import type { Geometry } from "geojson";
import { invariant } from "@/lib/errors/invariant";
import type { ConvertedFixes, FixConverter, FixDraft } from "./fix-draft";

// togeojson walks a DOM. A real one costs two kilobytes a fix; these few classes answer exactly the calls it
// makes for a track and stand on drafts that are used again for every batch.

const NONE: readonly never[] = Object.freeze([]);
type DraftName = Exclude<keyof FixDraft, "timeMs" | "clear" | "copy">;

/** A leaf element whose text is one field of a draft. */
class Leaf {
  readonly nodeType = 1;
  readonly nodeName: string;
  readonly childNodes = NONE;
  private readonly draft: FixDraft;
  private readonly field: DraftName;

  constructor(nodeName: string, draft: FixDraft, field: DraftName) {
    this.nodeName = nodeName;
    this.draft = draft;
    this.field = field;
  }

  get textContent(): string {
    return this.draft[this.field];
  }

  normalize(): void {}
}

/** An inner element: lists by tag name, nothing by namespace. */
class Branch {
  readonly nodeType = 1;
  readonly tagName: string;
  readonly childNodes: { readonly length: number; item(index: number): unknown };
  private readonly lists: Readonly<Record<string, readonly unknown[]>>;

  constructor(tagName: string, lists: Readonly<Record<string, readonly unknown[]>>, child: unknown = null) {
    this.tagName = tagName;
    this.lists = lists;
    this.childNodes = { length: child === null ? 0 : 1, item: () => child };
  }

  getElementsByTagName(tag: string): readonly unknown[] {
    return this.lists[tag] ?? NONE;
  }

  getElementsByTagNameNS(): readonly never[] {
    return NONE;
  }

  getAttribute(): null {
    return null;
  }
}

/** A `trkpt`: position as attributes, elevation and time as children, the rest as extensions. */
class GpxPoint {
  private readonly draft: FixDraft;
  private readonly elevation: readonly Leaf[];
  private readonly time: readonly Leaf[];
  private readonly extensions: readonly [{ childNodes: Leaf[] }];
  private readonly extras: readonly (readonly [DraftName, Leaf])[];

  constructor(draft: FixDraft) {
    this.draft = draft;
    this.elevation = [new Leaf("ele", draft, "elevation")];
    this.time = [new Leaf("time", draft, "time")];
    this.extensions = [{ childNodes: [] }];
    this.extras = [
      ["heartRate", new Leaf("heart", draft, "heartRate")],
      ["speed", new Leaf("speed", draft, "speed")],
      ["hdop", new Leaf("hdop", draft, "hdop")],
      ["satellites", new Leaf("sat", draft, "satellites")],
    ];
  }

  getAttribute(name: string): string {
    return name === "lat" ? this.draft.lat : this.draft.lon;
  }

  getElementsByTagName(tag: string): readonly unknown[] {
    if (tag === "time") return this.time;
    if (tag === "ele") return this.draft.elevation === "" ? NONE : this.elevation;
    if (tag !== "extensions") return NONE;
    const nodes: Leaf[] = [];
    for (const [field, leaf] of this.extras) if (this.draft[field] !== "") nodes.push(leaf);
    this.extensions[0].childNodes = nodes;
    return nodes.length === 0 ? NONE : this.extensions;
  }
}

/** A `Trackpoint`; heart rate answers to the aligned name, because togeojson closes up the other one's gaps. */
class TcxPoint {
  private readonly fields: Readonly<Record<string, readonly [Leaf]>>;
  private readonly draft: FixDraft;

  constructor(draft: FixDraft) {
    this.draft = draft;
    this.fields = {
      LatitudeDegrees: [new Leaf("LatitudeDegrees", draft, "lat")],
      LongitudeDegrees: [new Leaf("LongitudeDegrees", draft, "lon")],
      AltitudeMeters: [new Leaf("AltitudeMeters", draft, "elevation")],
      Time: [new Leaf("Time", draft, "time")],
      heartRate: [new Leaf("heartRate", draft, "heartRate")],
      Speed: [new Leaf("Speed", draft, "speed")],
    };
  }

  getElementsByTagName(tag: string): readonly unknown[] {
    if (tag === "heartRate" && this.draft.heartRate === "") return NONE;
    if (tag === "Speed" && this.draft.speed === "") return NONE;
    if (tag === "AltitudeMeters" && this.draft.elevation === "") return NONE;
    return this.fields[tag] ?? NONE;
  }

  getElementsByTagNameNS(): readonly never[] {
    return NONE;
  }
}

/** A `gx:coord`: longitude, latitude and, when known, elevation, with single blanks as togeojson wants them. */
class KmlCoord {
  private readonly draft: FixDraft;

  constructor(draft: FixDraft) {
    this.draft = draft;
  }

  get textContent(): string {
    const { lat, lon, elevation } = this.draft;
    return elevation === "" ? `${lon} ${lat}` : `${lon} ${lat} ${elevation}`;
  }

  normalize(): void {}
}

/** Wraps every draft once and hands out the first `count` wrappers. */
function wrapOnce<T>(wrap: (draft: FixDraft) => T): (drafts: readonly FixDraft[], count: number) => T[] {
  const known = new Map<FixDraft, T>();
  return (drafts, count) => {
    const wrapped: T[] = [];
    for (let index = 0; index < count; index++) {
      const draft = drafts[index] as FixDraft;
      let point = known.get(draft);
      if (point === undefined) {
        point = wrap(draft);
        known.set(draft, point);
      }
      wrapped.push(point);
    }
    return wrapped;
  };
}

type Column = readonly (number | null)[] | undefined;

function lineOf(geometry: Geometry | null | undefined, count: number): readonly (readonly number[])[] {
  invariant(geometry?.type === "LineString", "togeojson makes one line of one batch");
  invariant(geometry.coordinates.length === count, "togeojson keeps every fix that was checked before");
  return geometry.coordinates;
}

/** The facade is no Document, it only answers what togeojson asks; the one place where that is asserted. */
function asDocument(root: Branch): Document {
  return root as unknown as Document;
}

/** Batches of GPX track points through togeojson's `gpx`. */
export function gpxConverter(): FixConverter {
  const points = wrapOnce((draft) => new GpxPoint(draft));
  return (drafts, count): ConvertedFixes => {
    const segment = new Branch("trkseg", { trkpt: points(drafts, count) });
    const root = new Branch("gpx", { trk: [new Branch("trk", { trkseg: [segment] })] });
    const feature = gpx(asDocument(root)).features[0];
    const columns = (feature?.properties?.["coordinateProperties"] ?? {}) as Record<string, Column>;
    return {
      coordinates: lineOf(feature?.geometry, count),
      heartRate: columns["heart"],
      speed: columns["speeds"],
      hdop: columns["hdops"],
      satellites: columns["sats"],
    };
  };
}

/** Batches of TCX trackpoints through togeojson's `tcx`. */
export function tcxConverter(): FixConverter {
  const points = wrapOnce((draft) => new TcxPoint(draft));
  return (drafts, count): ConvertedFixes => {
    const track = new Branch("Track", { Trackpoint: points(drafts, count) });
    const root = new Branch("#document", { Lap: [new Branch("Lap", { Track: [track] })] });
    const feature = tcx(asDocument(root)).features[0];
    const columns = (feature?.properties ?? {}) as Record<string, Column>;
    return {
      coordinates: lineOf(feature?.geometry, count),
      heartRate: columns["heartRates"],
      speed: columns["speeds"],
    };
  };
}

/** Batches of KML fixes as a `gx:Track` through togeojson's `kml`. */
export function kmlConverter(): FixConverter {
  const coords = wrapOnce((draft) => new KmlCoord(draft));
  const times = wrapOnce((draft) => new Leaf("when", draft, "time"));
  return (drafts, count): ConvertedFixes => {
    const track = new Branch("gx:Track", { coord: coords(drafts, count), when: times(drafts, count) });
    const placemark = new Branch("Placemark", {}, track);
    const feature = kml(asDocument(new Branch("#document", { Placemark: [placemark] }))).features[0];
    return { coordinates: lineOf(feature?.geometry, count) };
  };
}
