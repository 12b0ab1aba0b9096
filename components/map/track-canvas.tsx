"use client";
import "maplibre-gl/dist/maplibre-gl.css";
import * as maplibre from "maplibre-gl";
import { useCallback, useDeferredValue, useEffect, useMemo, useRef, useState } from "react";
import { Layer, Map as MapView, type MapRef, Marker, Source } from "react-map-gl/maplibre";
import type { SpeedScale } from "@/lib/display/speed-ramp";
import { type Theme, themeTokens } from "@/lib/display/theme-tokens";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";
import type { DistanceUnit } from "@/lib/units/length";
import { fitBox } from "./fit-box";
import { graticule } from "./graticule";
import { MapButtons } from "./map-buttons";
import { ScaleBar } from "./scale-bar";
import { trackEnds } from "./track-ends";
import { trackFeatures } from "./track-features";
import { DETAILS, endLayers, trackLayers } from "./track-layers";
import type { Place } from "./place";
import type { Bounds, TrackShape } from "./track-shape";
import type { Basemap } from "./use-basemap";
import { useCursorDot } from "./use-cursor-dot";
import { useCursorPointer } from "./use-cursor-pointer";
import { useTheme } from "@/components/ui/use-theme";

// The bundler cannot find the worker on its own: without its address the map stays blank.
maplibre.setWorkerUrl(new URL("maplibre-gl/dist/maplibre-gl-worker.mjs", import.meta.url).toString());

export type TrackCanvasProps = {
  shape: TrackShape;
  bounds: Bounds;
  scale: SpeedScale;
  stretch: Stretch | null;
  cursor: TimeCursor;
  distanceUnit: DistanceUnit;
  places: readonly Place[];
  basemap: Basemap;
  label: string;
  onFailure: () => void;
};

const FIT = { padding: { top: 56, bottom: 72, left: 48, right: 72 }, maxZoom: 16.5 } as const;

/** Set off from land and water by a rim of the sheet's colour. */
const PLACE =
  "pointer-events-none block text-center text-sm leading-5 font-semibold text-ink [font-family:var(--sans)] [text-shadow:-1px_-1px_0_var(--sheet),1px_-1px_0_var(--sheet),-1px_1px_0_var(--sheet),1px_1px_0_var(--sheet),0_0_4px_var(--sheet)]";

function words(label: string): Record<string, string> {
  return {
    "Map.Title": `${label}. Arrow keys move the map, plus and minus zoom.`,
    "CooperativeGesturesHandler.WindowsHelpText": "Hold Ctrl and scroll to zoom",
    "CooperativeGesturesHandler.MacHelpText": "Hold ⌘ and scroll to zoom",
    "CooperativeGesturesHandler.MobileHelpText": "Move the map with two fingers",
  };
}

/** Paths of our own server become whole addresses, because the worker that fetches them has no page. */
function wholeAddress(url: string): { url: string } {
  return { url: url.startsWith("/") ? `${window.location.origin}${url}` : url };
}

/** The moving map: background, track, stretch, places and cursor. Only in the browser. */
export function TrackCanvas(props: TrackCanvasProps) {
  const { shape, bounds, scale, cursor, basemap } = props;
  const theme = useTheme();
  const [map, setMap] = useState<maplibre.Map | null>(null);
  const mapRef = useRef<MapRef>(null);
  const stretch = useDeferredValue(props.stretch);
  const ends = useMemo(() => trackEnds(shape), [shape]);
  const grid = useMemo(() => graticule(bounds), [bounds]);
  useCursorDot(map, shape, cursor);
  useCursorPointer(map, shape, cursor);
  useEffect(() => {
    map?.keyboard.disableRotation();
    map?.touchZoomRotate.disableRotation();
  }, [map]);
  const box = useMemo(() => fitBox(bounds, props.places), [bounds, props.places]);
  const showWhole = useCallback(() => map?.fitBounds(box, { ...FIT, duration: 400 }), [map, box]);
  const plain = basemap.state !== "ready" && basemap.state !== "external";
  const tokens = themeTokens(theme);
  return (
    <>
      <MapView
        ref={mapRef}
        mapLib={maplibre}
        initialViewState={{ bounds: box, fitBoundsOptions: FIT }}
        mapStyle={styleOf(basemap, theme)}
        locale={words(props.label)}
        transformRequest={wholeAddress}
        attributionControl={basemap.state === "external" ? {} : false}
        cooperativeGestures
        dragRotate={false}
        pitchWithRotate={false}
        maxPitch={0}
        touchPitch={false}
        maxZoom={18}
        minZoom={1}
        cursor="crosshair"
        onLoad={(event) => {
          // A container measured before the style sheet came keeps its first size otherwise.
          event.target.resize();
          event.target.fitBounds(box, { ...FIT, duration: 0 });
          setMap(event.target);
        }}
        onError={(event) => {
          if (event.target === null) props.onFailure();
        }}
      >
        {plain && (
          <Source id="graticule" type="geojson" data={grid.lines}>
            <Layer
              id="graticule-lines"
              type="line"
              paint={{ "line-color": tokens.muted, "line-width": 0.5, "line-opacity": 0.5 }}
            />
          </Source>
        )}
        <TrackSources id="track" shape={shape} scale={scale} theme={theme} receding={stretch !== null} />
        {stretch !== null && (
          <TrackSources
            id="stretch"
            shape={shape}
            scale={scale}
            theme={theme}
            receding={false}
            stretch={stretch}
          />
        )}
        <Source id="ends" type="geojson" data={ends}>
          {endLayers(theme).map((layer) => (
            <Layer key={layer.id} {...layer} />
          ))}
        </Source>
        {props.places.map((place) => (
          <Marker
            key={`${place.name} ${place.lat} ${place.lon}`}
            longitude={place.lon}
            latitude={place.lat}
            anchor="top"
            offset={[0, -3]}
          >
            <span aria-hidden="true" className={PLACE}>
              <span className="bg-ink mx-auto block size-1.5 outline-1 outline-sheet" />
              {place.name}
            </span>
          </Marker>
        ))}
      </MapView>
      <ScaleBar map={map} unit={props.distanceUnit} />
      <MapButtons map={map} onWhole={showWhole} />
    </>
  );
}

type TrackSourcesProps = {
  id: string;
  shape: TrackShape;
  scale: SpeedScale;
  theme: Theme;
  receding: boolean;
  stretch?: Stretch;
};

/** One source per closeness, each drawn at its own zooms. */
function TrackSources({ id, shape, scale, theme, receding, stretch }: TrackSourcesProps) {
  const sources = useMemo(
    () => DETAILS.map((detail) => ({ detail, data: trackFeatures(shape, { ...detail, scale, stretch }) })),
    [shape, scale, stretch],
  );
  return sources.map(({ detail, data }) => {
    const source = `${id}-${detail.name}`;
    return (
      // No tolerance: the runs are thinned already, and a second thinning would part their ends.
      <Source key={source} id={source} type="geojson" data={data} tolerance={0}>
        {trackLayers(theme, source, { receding, detail }).map((layer) => (
          <Layer key={layer.id} {...layer} />
        ))}
      </Source>
    );
  });
}

const BARE = { version: 8 as const, sources: {}, layers: [] };

function styleOf(basemap: Basemap, theme: Theme) {
  const bare = {
    ...BARE,
    layers: [
      {
        id: "water",
        type: "background" as const,
        paint: { "background-color": themeTokens(theme).water },
      },
    ],
  };
  if (basemap.state === "external") return basemap.styleUrl;
  if (basemap.state === "ready") return `/api/map/style?theme=${theme}&stamp=${basemap.stamp}`;
  return bare;
}
