import { at } from "@/lib/errors/invariant";
import type { Fixes } from "@/lib/track/fixes";

/** The fixes as a watch would write them: GPX 1.1, heart rate in an extension. */
export function fixesToGpx(fixes: Fixes): string {
  const points = Array.from({ length: fixes.count }, (_, i) => {
    const time = new Date(at(fixes.timeMs, i)).toISOString();
    const heart = fixes.heartRateBpm?.[i];
    const more = heart === undefined ? "" : `<extensions><hr>${heart}</hr></extensions>`;
    return `<trkpt lat="${at(fixes.latDeg, i)}" lon="${at(fixes.lonDeg, i)}"><time>${time}</time>${more}</trkpt>`;
  });
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    '<gpx version="1.1" creator="Trimwake scenario" xmlns="http://www.topografix.com/GPX/1/1"><trk><trkseg>',
    ...points,
    "</trkseg></trk></gpx>",
  ].join("\n");
}
