"use client";

import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useCallback, useMemo, useState } from "react";
import { TrackMap } from "@/components/map/track-map";
import { trackSpeedScale } from "@/components/map/track-speed-scale";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { TrackPayload } from "@/lib/analysis/track-payload";
import { summarise } from "@/lib/analysis/summarise";
import { formatTimeSpan } from "@/lib/display/format-time";
import { createTimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";
import type { SessionData } from "./session-data";
import { MainFigures, MoreFigures } from "./session-figures";
import { SessionDetailCharts } from "./session-detail-charts";
import { useTrackPayload } from "./use-track-payload";

/** The session: figures at once, the drawings when the track has come, all joined by one cursor. */
export function SessionSheet({ data }: { data: SessionData }) {
  const [client] = useState(() => new QueryClient());
  return (
    <QueryClientProvider client={client}>
      <Loader data={data} />
    </QueryClientProvider>
  );
}

function Loader({ data }: { data: SessionData }) {
  const { data: track, error, isFetching, refetch } = useTrackPayload(data.id, data.revision);
  if (track !== undefined) return <Sheet key={data.revision} data={data} track={track} />;
  const { figures, discipline, units } = data;
  return (
    <>
      <div className="mt-6 grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        {error === null ? (
          <Skeleton className="h-80 w-full md:h-[26rem]" />
        ) : (
          <Notice kind="problem" title="The track is not here">
            <p>{error.message}</p>
            <Button className="mt-3" onClick={() => void refetch()} disabled={isFetching}>
              Try again
            </Button>
          </Notice>
        )}
        <MainFigures figures={figures} discipline={discipline} units={units} of="Whole session" />
      </div>
      <MoreFigures figures={figures} units={units} of="Whole session" />
    </>
  );
}

function Sheet({ data, track }: { data: SessionData; track: TrackPayload }) {
  const { discipline, units, timeZone } = data;
  const [cursor] = useState(() => createTimeCursor(track.window.startMs));
  const [stretch, setStretch] = useState<Stretch | null>(null);
  const [isZoomed, setZoomed] = useState(false);
  const scale = useMemo(() => trackSpeedScale(track.series, units.speed), [track, units.speed]);
  const figures = useMemo(
    () => (stretch === null ? data.figures : summarise(track, stretch)),
    [track, stretch, data.figures],
  );
  const brush = useCallback((next: Stretch | null) => {
    setStretch(next);
    if (next === null) setZoomed(false);
    window.dispatchEvent(new CustomEvent("trimwake:stretch", { detail: next }));
  }, []);
  const of =
    stretch === null
      ? "Whole session"
      : `Stretch ${formatTimeSpan(stretch.startMs, stretch.endMs, timeZone)}, worked out again`;
  return (
    <>
      <div className="mt-6 grid gap-x-10 gap-y-8 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <TrackMap
          series={track.series}
          cursor={cursor}
          stretch={stretch}
          speedUnit={units.speed}
          distanceUnit={units.distance}
          scale={scale}
          places={data.places}
          windFromDeg={data.windFromDeg}
          label={`Map of ${data.title}`}
        />
        <MainFigures
          figures={figures}
          discipline={discipline}
          units={units}
          of={of}
          onWhole={stretch === null ? undefined : () => brush(null)}
        />
      </div>
      <SessionDetailCharts
        data={data}
        track={track}
        figures={figures}
        cursor={cursor}
        scale={scale}
        stretch={stretch}
        isZoomed={isZoomed}
        onStretch={brush}
        onZoom={setZoomed}
        more={<MoreFigures figures={figures} units={units} of={of} />}
      />
    </>
  );
}
