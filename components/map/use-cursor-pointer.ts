import type { Map as MapLibreMap, MapMouseEvent } from "maplibre-gl";
import { useEffect, useMemo } from "react";
import type { TimeCursor } from "@/lib/display/time-cursor";
import { nearestSample } from "./nearest-sample";
import type { TrackShape } from "./track-shape";

/** Pixels round the pointer in which the track takes the cursor: a mouse points finely, a thumb does not. */
const REACH_MOVE_PX = 28;
const REACH_TAP_PX = 44;

/** Moves the cursor to the sample under the pointer, or under a tap. */
export function useCursorPointer(map: MapLibreMap | null, shape: TrackShape, cursor: TimeCursor): void {
  const nearest = useMemo(() => nearestSample(shape), [shape]);
  useEffect(() => {
    if (map === null) return undefined;
    const { startMs, stepMs } = shape.series;
    const point = (event: MapMouseEvent, reachPx: number) => {
      const { lng, lat } = event.lngLat;
      const beside = map.unproject([event.point.x + reachPx, event.point.y]);
      const timeMs = cursor.get();
      const found = nearest.find(
        lng,
        lat,
        event.lngLat.distanceTo(beside),
        timeMs === null ? null : (timeMs - startMs) / stepMs,
      );
      if (found !== null) cursor.set(startMs + found * stepMs);
    };
    const move = (event: MapMouseEvent) => {
      if (event.originalEvent.buttons === 0) point(event, REACH_MOVE_PX);
    };
    const tap = (event: MapMouseEvent) => point(event, REACH_TAP_PX);
    map.on("mousemove", move);
    map.on("click", tap);
    return () => {
      map.off("mousemove", move);
      map.off("click", tap);
    };
  }, [map, shape, cursor, nearest]);
}
