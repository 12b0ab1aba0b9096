"use client";

import { useMemo, useState, type ReactNode } from "react";
import { LullFan } from "@/components/chart/lull-fan";
import { Timeline } from "@/components/chart/timeline";
import { UnrolledRun } from "@/components/chart/unrolled-run";
import { Disclosure } from "@/components/ui/disclosure";
import { Section } from "@/components/ui/section";
import type { Figures } from "@/lib/analysis/analysis";
import type { TrackPayload } from "@/lib/analysis/track-payload";
import type { SpeedScale } from "@/lib/display/speed-ramp";
import type { TimeCursor } from "@/lib/display/time-cursor";
import type { Stretch } from "@/lib/track/speed-series";
import { BumpTable } from "./bump-table";
import { LullTable } from "./lull-table";
import { MinuteTable } from "./minute-table";
import { QualityReport } from "./quality-report";
import { Scrubber } from "./scrubber";
import { SegmentTable } from "./segment-table";
import type { SessionData } from "./session-data";
import { StretchFigures } from "./session-figures";
import { StretchControls } from "./stretch-controls";

export type SessionDetailChartsProps = {
  data: SessionData;
  track: TrackPayload;
  figures: Figures;
  cursor: TimeCursor;
  scale: SpeedScale;
  stretch: Stretch | null;
  isZoomed: boolean;
  onStretch: (stretch: Stretch | null) => void;
  onZoom: (zoomed: boolean) => void;
  /** Stands between the timeline and the fan. */
  more: ReactNode;
};

const overlaps = (a: Stretch, b: Stretch) => a.startMs < b.endMs && a.endMs > b.startMs;

/** Everything below the map: run unrolled, timeline with its controls, lull fan, tables, quality. */
export function SessionDetailCharts(props: SessionDetailChartsProps) {
  const { data, track, figures, cursor, scale, stretch, isZoomed, onStretch, onZoom, more } = props;
  const { timeZone, units, gear } = data;
  const [touchBrushes, setTouchBrushes] = useState(false);
  const shown = stretch ?? track.window;
  const view = isZoomed ? shown : track.window;
  const strips = useMemo(
    () => ({ segments: track.segments, bumpRides: track.bumpRides, gear, series: track.series }),
    [track, gear],
  );
  const segments = useMemo(() => track.segments.filter((one) => overlaps(one, shown)), [track, shown]);
  const rides = useMemo(() => track.bumpRides.filter((one) => overlaps(one, shown)), [track, shown]);
  const lulls = useMemo(() => track.lulls.filter((one) => overlaps(one, shown)), [track, shown]);
  const zoom = (zoomed: boolean) => {
    // A cursor that is out of view would be lost.
    const now = cursor.get() ?? shown.startMs;
    if (zoomed) cursor.set(Math.min(shown.endMs, Math.max(shown.startMs, now)));
    onZoom(zoomed);
  };
  const tableKey = `${shown.startMs}-${shown.endMs}`;
  const table = {
    timeZone,
    speedUnit: units.speed,
    distanceUnit: units.distance,
    cursor,
    onSelect: onStretch,
  };
  return (
    <>
      <Section
        id="unrolled"
        title="The run, unrolled"
        reading="Along its own line to the right, sideways to another scale; colour is speed, dashes are off foil."
      >
        <UnrolledRun
          series={track.series}
          stretch={view}
          cursor={cursor}
          scale={scale}
          distanceUnit={units.distance}
        />
      </Section>
      <Section
        id="timeline"
        title="Timeline"
        reading="Speed with a band of one standard error; blocks are on foil, teeth are bump rides as tall as their gain. Drag to brush a stretch."
      >
        <Timeline
          strips={strips}
          view={view}
          stretch={stretch}
          cursor={cursor}
          speedUnit={units.speed}
          timeZone={timeZone}
          touchBrushes={touchBrushes}
          onBrush={onStretch}
        />
        <Scrubber
          series={track.series}
          view={view}
          fromMs={track.window.startMs}
          cursor={cursor}
          speedUnit={units.speed}
          timeZone={timeZone}
        />
        <StretchControls
          whole={track.window}
          stretch={stretch}
          isZoomed={isZoomed}
          touchBrushes={touchBrushes}
          timeZone={timeZone}
          cursor={cursor}
          onStretch={onStretch}
          onZoom={zoom}
          onTouchBrushes={setTouchBrushes}
        />
        {stretch !== null && <StretchFigures figures={figures} discipline={data.discipline} units={units} />}
        <Disclosure summary="Speed minute by minute, as a table" className="no-print mt-2">
          <MinuteTable key={tableKey} series={track.series} stretch={shown} {...table} />
        </Disclosure>
      </Section>
      {more}
      <Section
        id="fan"
        title="Lull fan"
        reading="A line a lull: energy height paid against way made. The ruled slope is the pooled glide ratio; flatter is better. On waves and with wind it is an apparent value."
      >
        <LullFan series={track.series} lulls={lulls} glide={figures.glide} />
        <Disclosure summary="The lulls as a table" className="no-print">
          <LullTable key={tableKey} lulls={lulls} {...table} />
        </Disclosure>
      </Section>
      <Section id="segments" title="On-foil segments" reading="Choose one to work its figures out.">
        <SegmentTable segments={segments} {...table} />
      </Section>
      <Section
        id="bump-rides"
        // Hundreds of lines that the comb shows already: a sheet of paper is for the run as a whole.
        className="no-print"
        title="Bump rides"
        reading="Over the middle between a peak and its neighbouring lulls."
      >
        <BumpTable bumpRides={rides} {...table} />
      </Section>
      <Section id="quality" title="Quality of the recording">
        <QualityReport quality={track.quality} />
      </Section>
    </>
  );
}
