"use client";
import dynamic from "next/dynamic";
import { useMemo, useState, useSyncExternalStore } from "react";
import { classNames } from "@/lib/display/class-names";
import { formatNumber } from "@/lib/display/format-number";
import { LAND_ATTRIBUTION, LAND_ATTRIBUTION_URL } from "@/lib/display/land-attribution";
import type { SpeedScale } from "@/lib/display/speed-ramp";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";
import type { DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";
import { graticule } from "./graticule";
import type { Place } from "./place";
import { SpeedLegend } from "./speed-legend";
import { TrackMapStatic } from "./track-map-static";
import { type Bounds, trackShape } from "./track-shape";
import { trackSpeedScale } from "./track-speed-scale";
import { type Basemap, useBasemap } from "./use-basemap";
import { WindRose } from "./wind-rose";

const TrackCanvas = dynamic(() => import("./track-canvas").then((module) => module.TrackCanvas), {
  ssr: false,
});

export type TrackMapProps = {
  series: SpeedSeries;
  cursor: TimeCursor;
  /** The brushed stretch, drawn strong while the rest fades; null for the whole session. */
  stretch?: Stretch | null;
  speedUnit: SpeedUnit;
  distanceUnit: DistanceUnit;
  /** The colours' scale when other drawings share it; worked out from the series otherwise. */
  scale?: SpeedScale;
  places?: readonly Place[];
  /** Degrees true the wind blows from, when known. */
  windFromDeg?: number | null;
  /** What the map shows in a few words, such as "Map of Slettestrand to Blokhus". */
  label: string;
  /** The map in sentences for those who cannot see it: way, direction, speeds. */
  summary?: string;
  /** Another attribution for the background, when it is not our land. */
  attribution?: string;
  /** Height classes; the height is reserved before anything is loaded. */
  heightClass?: string;
};

const NO_PLACES: readonly Place[] = [];

/**
 * The session on a map: track coloured by speed, dashes off foil, the brushed stretch, the cursor, the
 * coastline when the server has it. Everything is reached by keyboard; paper gets a drawing instead.
 */
export function TrackMap(props: TrackMapProps) {
  const { series, speedUnit, distanceUnit, label, places = NO_PLACES, stretch = null } = props;
  const [failed, setFailed] = useState(false);
  const drawsMaps = useSyncExternalStore(nothingChanges, hasWebGl, () => true);
  const basemap = useBasemap();
  const shape = useMemo(() => trackShape(series), [series]);
  const scale = useMemo(
    () => props.scale ?? trackSpeedScale(series, speedUnit),
    [props.scale, series, speedUnit],
  );
  const drawing = { series, scale, label, distanceUnit, places, widthPx: 640, heightPx: 400 };
  const moving = drawsMaps && !failed && shape.bounds !== null;
  return (
    <figure className="m-0">
      <div
        className={classNames(
          "border-ink bg-water relative isolate overflow-hidden border print:hidden",
          props.heightClass ?? "h-80 md:h-[26rem]",
        )}
      >
        {moving && shape.bounds !== null ? (
          <TrackCanvas
            shape={shape}
            bounds={shape.bounds}
            scale={scale}
            stretch={stretch}
            cursor={props.cursor}
            distanceUnit={distanceUnit}
            places={places}
            basemap={basemap}
            label={label}
            onFailure={() => setFailed(true)}
          />
        ) : (
          <TrackMapStatic {...drawing} className="absolute inset-0 size-full" />
        )}
        {moving && <WindRose windFromDeg={props.windFromDeg ?? null} />}
        <MapNote basemap={basemap} moving={moving} bounds={shape.bounds} />
        {moving && basemap.state === "ready" && <Attribution text={props.attribution} />}
      </div>
      <TrackMapStatic {...drawing} className="hidden w-full border print:block" />
      <figcaption className="mt-2">
        {props.summary !== undefined && <p className="sr-only">{props.summary}</p>}
        <SpeedLegend scale={scale} unit={speedUnit} />
      </figcaption>
    </figure>
  );
}

function nothingChanges(): () => void {
  return () => undefined;
}

let webGl: boolean | null = null;

/** Asked once: every question costs a drawing context. */
function hasWebGl(): boolean {
  if (webGl === null) {
    const context = document.createElement("canvas").getContext("webgl2");
    webGl = context !== null;
    context?.getExtension("WEBGL_lose_context")?.loseContext();
  }
  return webGl;
}

function noteText(basemap: Basemap, moving: boolean, bounds: Bounds | null): string {
  if (bounds === null) return "";
  if (!moving) return "This browser cannot draw the moving map, so the track is drawn alone.";
  const lines = `Lines are ${formatNumber(graticule(bounds).stepMin, 0)}′ apart.`;
  if (basemap.state === "preparing") {
    return `The coastline is being prepared (${Math.round(basemap.share * 100)}\u00a0%). ${lines}`;
  }
  if (basemap.state === "missing") return `The coastline is not on this server. ${lines}`;
  if (basemap.state === "unreachable") {
    return `The server does not answer, so the coastline is missing. ${lines}`;
  }
  return "";
}

function MapNote(props: { basemap: Basemap; moving: boolean; bounds: Bounds | null }) {
  const text = noteText(props.basemap, props.moving, props.bounds);
  return (
    <p
      role="status"
      className={classNames(
        "bg-sheet/90 absolute top-2 left-2 max-w-[calc(100%-5.5rem)] px-2 py-1 text-sm",
        text === "" && "sr-only",
      )}
    >
      {text}
    </p>
  );
}

function Attribution({ text }: { text: string | undefined }) {
  return (
    <a
      href={LAND_ATTRIBUTION_URL}
      rel="noreferrer"
      target="_blank"
      className="bg-sheet/85 text-ink absolute right-0 bottom-0 px-2 py-1 text-xs leading-4 underline"
    >
      {text ?? LAND_ATTRIBUTION}
    </a>
  );
}
