import type { Database } from "@/db/client";
import { newId } from "@/db/new-id";
import { session } from "@/db/schema/session";
import { sessionFigures, WHOLE_SESSION } from "@/db/schema/session-figures";
import { track } from "@/db/schema/track";
import { upload } from "@/db/schema/upload";
import type { AnalysedTrack } from "@/lib/analysis/analysis";
import { summarise } from "@/lib/analysis/summarise";
import { figuresRow } from "@/lib/server/sessions/figures-row";
import { encodeSeries } from "@/lib/track/series-blob";
import { FLAG_ON_FOIL, FLAG_ON_WATER, type SpeedSeries } from "@/lib/track/speed-series";

/** A straight run due north at a steady speed, all on foil, one sample a second. */
export function steadySeries(startMs: number, seconds: number, speedMps: number): SpeedSeries {
  const count = seconds + 1;
  const ramp = (step: number, from = 0) => Float64Array.from({ length: count }, (_, i) => from + i * step);
  return {
    startMs,
    stepMs: 1000,
    count,
    // 111,412 m is one degree of latitude near 57° N on WGS84.
    latDeg: ramp(speedMps / 111_412, 57.1),
    lonDeg: ramp(0, 9.3),
    speedMps: new Float32Array(count).fill(speedMps),
    speedSeMps: new Float32Array(count).fill(0.1),
    courseDeg: new Float32Array(count),
    distanceM: ramp(speedMps),
    heartRateBpm: null,
    flags: new Uint8Array(count).fill(FLAG_ON_WATER | FLAG_ON_FOIL),
  };
}

/** A stored session of one rider as an import would leave it: upload, session, track and whole-session figures. */
export async function makeSession(
  db: Database,
  ownerId: string,
  options: {
    startMs: number;
    seconds?: number;
    speedMps?: number;
    overrides?: Partial<typeof session.$inferInsert>;
  },
): Promise<typeof session.$inferSelect> {
  const { startMs, seconds = 1200, speedMps = 8, overrides = {} } = options;
  const series = steadySeries(startMs, seconds, speedMps);
  const endMs = startMs + seconds * 1000;
  const analysed: AnalysedTrack = {
    series,
    segments: [
      {
        startMs,
        endMs,
        distanceM: seconds * speedMps,
        speedMpsMean: speedMps,
        speedMpsMax: speedMps,
        bearingDeg: 0,
        confidence: 1,
        takeoffEffortS: 5,
      },
    ],
    bumpRides: [],
    lulls: [],
    quality: {
      grade: "A",
      reasons: [],
      rateHz: 1,
      fixesRead: series.count,
      fixesKept: series.count,
      spikesDropped: 0,
      gapCount: 0,
      gapShare: 0,
      noiseM: 1,
      receiverSpeedUsed: false,
      notes: [],
    },
  };
  const id = newId();
  return db.write(async (tx) => {
    const uploadId = newId();
    await tx.insert(upload).values({
      id: uploadId,
      ownerId,
      sha256: uploadId,
      sizeBytes: 1,
      fileName: "made.gpx",
      status: "done",
      verdicts: [],
      createdAtMs: startMs,
    });
    const rows = await tx
      .insert(session)
      .values({
        id,
        ownerId,
        uploadId,
        format: "gpx",
        title: "Slettestrand to Blokhus",
        discipline: "downwind",
        timeZone: "Europe/Copenhagen",
        startMs,
        endMs,
        qualityGrade: "A",
        analysisVersion: 1,
        createdAtMs: startMs,
        ...overrides,
      })
      .returning();
    await tx.insert(track).values({
      sessionId: id,
      ownerId,
      series: Buffer.from(encodeSeries(series)),
      segments: [...analysed.segments],
      bumpRides: [],
      lulls: [],
      quality: analysed.quality,
      windowStartMs: startMs,
      windowEndMs: endMs,
      firstFixMs: startMs,
      lastFixMs: endMs,
    });
    const figures = summarise(analysed, { startMs, endMs });
    const of = { sessionId: id, spanId: WHOLE_SESSION, ownerId, setupId: null };
    await tx
      .insert(sessionFigures)
      .values(figuresRow({ ...of, discipline: rows[0]?.discipline ?? "downwind" }, figures));
    const row = rows[0];
    if (row === undefined) throw new Error("no session row");
    return row;
  });
}
