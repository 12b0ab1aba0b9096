"use client";
import type { Map as MapLibreMap } from "maplibre-gl";
import { Maximize, Minus, Plus } from "lucide-react";
import { IconButton } from "@/components/ui/icon-button";

/** Zoom and the way back to the whole track, for those who do not pinch or scroll. */
export function MapButtons({ map, onWhole }: { map: MapLibreMap | null; onWhole: () => void }) {
  return (
    <div className="absolute right-2 bottom-8 flex flex-col [&>button+button]:-mt-px">
      <IconButton label="Zoom in" icon={<Plus size={18} />} onClick={() => map?.zoomIn()} />
      <IconButton label="Zoom out" icon={<Minus size={18} />} onClick={() => map?.zoomOut()} />
      <IconButton label="Show the whole track" icon={<Maximize size={18} />} onClick={onWhole} />
    </div>
  );
}
