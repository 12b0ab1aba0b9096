"use client";
import type { Map as MapLibreMap } from "maplibre-gl";
import { useEffect, useState } from "react";
import type { DistanceUnit } from "@/lib/units/length";
import { scaleBarLength } from "./scale-bar-length";

const MAX_PX = 110;

/** A bar of a round length at the bottom of the map, in the rider's unit. */
export function ScaleBar({ map, unit }: { map: MapLibreMap | null; unit: DistanceUnit }) {
  const [metresPerPx, setMetresPerPx] = useState(0);
  useEffect(() => {
    if (map === null) return undefined;
    const measure = () => {
      const middle = map.getContainer().clientHeight / 2;
      const span = map.unproject([0, middle]).distanceTo(map.unproject([100, middle]));
      // To three figures: a moving map changes the rest all the time, and each change is a render.
      setMetresPerPx(Number((span / 100).toPrecision(3)));
    };
    measure();
    map.on("zoom", measure);
    map.on("moveend", measure);
    map.on("resize", measure);
    return () => {
      map.off("zoom", measure);
      map.off("moveend", measure);
      map.off("resize", measure);
    };
  }, [map]);
  const bar = scaleBarLength(metresPerPx, MAX_PX, unit);
  if (bar === null) return null;
  return (
    <div className="bg-sheet/85 pointer-events-none absolute bottom-8 left-2 sm:bottom-2 px-2 pt-0.5 pb-1.5">
      <span className="sr-only">Scale bar: </span>
      <span className="num block text-xs">{bar.label}</span>
      <span
        aria-hidden="true"
        className="border-ink block h-1.5 border-x border-b"
        style={{ width: `${bar.widthPx}px` }}
      />
    </div>
  );
}
