import { Marker, type Map as MapLibreMap } from "maplibre-gl";
import { useEffect } from "react";
import type { TimeCursor } from "@/lib/display/time-cursor";
import { positionAt, type TrackShape } from "./track-shape";

const DOT =
  "size-4 rounded-full border-2 border-sheet bg-buoy outline-1 outline-ink pointer-events-none z-10";

/** Keeps a dot on the map at the cursor's moment, moved by hand: React renders nothing when it moves. */
export function useCursorDot(map: MapLibreMap | null, shape: TrackShape, cursor: TimeCursor): void {
  useEffect(() => {
    if (map === null) return undefined;
    const element = document.createElement("div");
    element.className = DOT;
    element.setAttribute("aria-hidden", "true");
    const marker = new Marker({ element });
    let onMap = false;
    const place = (timeMs: number | null) => {
      const position = timeMs === null ? null : positionAt(shape, timeMs);
      if (position === null) {
        if (onMap) marker.remove();
        onMap = false;
        return;
      }
      marker.setLngLat([position.lonDeg, position.latDeg]);
      if (!onMap) marker.addTo(map);
      onMap = true;
    };
    place(cursor.get());
    const end = cursor.subscribe(place);
    return () => {
      end();
      marker.remove();
    };
  }, [map, shape, cursor]);
}
