import { gzipSync } from "node:zlib";
import { fixesToGpx } from "./fixes-to-gpx";
import { planSeason, SETUP_EFFECT_MPS, SPOTS, type DemoRider, type PlannedSession } from "./season";
import { record } from "./receiver";
import { downwinder, wingSession } from "./sessions";
import type { Form } from "./motion";
import { makeQuiver } from "./gear";
import type { Context } from "@/lib/server/context/context";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { listPlaces } from "@/lib/server/places/list-places";
import { recordPlace } from "@/lib/server/places/record-place";
import { getSession } from "@/lib/server/sessions/get-session";
import { updateSession } from "@/lib/server/sessions/update-session";
import { importUpload } from "@/lib/server/uploads/import-upload";
import { receiveUpload } from "@/lib/server/uploads/receive-upload";
import { at } from "@/lib/errors/invariant";
import { seededRng, standardNormal, type Rng } from "@/lib/numeric/rng";
import { speedToMps } from "@/lib/units/speed";

const SEASON_START_MS = Date.UTC(2026, 3, 11, 8);
const DAY_MS = 86_400_000;

function formOf(rider: DemoRider, plan: PlannedSession, setup: string, rng: Rng): Form {
  const day = 0.15 * standardNormal(rng);
  const wing = plan.discipline === "wing" ? 0.3 : 0;
  return {
    cruiseMps: 7.1 + 0.06 * (plan.windKn - 16) + rider.skillMps + (SETUP_EFFECT_MPS[setup] ?? 0) + day + wing,
    surgeMps: plan.discipline === "wing" ? 1.1 : 1.7 + 0.4 * plan.waveHeightM,
    steadinessS: 260 + 500 * (rider.skillMps + 0.3),
    takeoffMps: 4.3,
  };
}

/** The watch's file of one planned session. */
function trackFile(rider: DemoRider, plan: PlannedSession, rng: Rng): { gpx: string; startMs: number } {
  const startMs = SEASON_START_MS + plan.day * DAY_MS + plan.minute * 60_000;
  const form = formOf(rider, plan, at(plan.setups, 0), rng);
  const from = SPOTS[plan.from].at;
  const bumpPeriodS = 6 + 1.1 * plan.wavePeriodS;
  const motion =
    plan.discipline === "wing"
      ? wingSession({ from, windFromDeg: plan.windFromDeg, form, minutes: 35 + 25 * rng(), bumpPeriodS, rng })
      : downwinder({ from, to: SPOTS[plan.to].at, form, bumpPeriodS, drive: plan.drive, rng });
  const fixes = record(motion, { startMs, noise: plan.noise, heartRate: plan.heartRate, rng });
  return { gpx: fixesToGpx(fixes), startMs };
}

async function addSession(ctx: Context, plan: PlannedSession, gpx: string, setups: Map<string, string>) {
  const body = new Blob([new Uint8Array(gzipSync(gpx))]).stream();
  const fileName = `${plan.discipline}-day-${plan.day}.gpx.gz`;
  const stored = await receiveUpload(ctx, { fileName, body, declaredBytes: null });
  const setupId = setups.get(at(plan.setups, 0)) ?? null;
  const verdict = (await importUpload(ctx, { uploadId: stored.uploadId, setupId }))[0];
  if (verdict?.kind !== "read") throw new Error(`a demo track was not read: ${JSON.stringify(verdict)}`);
  const { sessionId } = verdict;
  await updateSession(ctx, sessionId, {
    discipline: plan.discipline,
    spot: SPOTS[plan.from].name,
    windFromDeg: plan.windFromDeg,
    windSpeedMps: speedToMps(plan.windKn, "kn"),
    wavePeriodS: plan.wavePeriodS,
    waveHeightM: plan.waveHeightM,
    water: "sea",
    notes: plan.notes,
  });
  for (const [end, spot] of [
    ["start", plan.from],
    ["end", plan.to],
  ] as const) {
    const known = (await listPlaces(ctx)).some((place) => place.name === SPOTS[spot].name);
    if (!known) await recordPlace(ctx, { sessionId, end, name: SPOTS[spot].name });
  }
  const second = plan.setups[1];
  if (second !== undefined) {
    const session = await getSession(ctx, sessionId);
    const half = Math.round((session.startMs + session.endMs) / 2);
    await setGearSpans(ctx, sessionId, [
      { setupId, startMs: null, endMs: half },
      { setupId: setups.get(second), startMs: half, endMs: null },
    ]);
  }
}

/** A rider's quiver and season through the same verbs as the pages; `contextAt` sets the clock of each day. */
export async function makeSeason(
  rider: DemoRider,
  seed: number,
  contextAt: (timeMs: number) => Context,
  tell: (done: number, of: number) => void,
): Promise<void> {
  const rng = seededRng(seed);
  const setups = await makeQuiver(contextAt(SEASON_START_MS - DAY_MS), rider.setups);
  const plans = planSeason(rider, rng);
  for (const [index, plan] of plans.entries()) {
    const { gpx, startMs } = trackFile(rider, plan, rng);
    await addSession(contextAt(startMs + 4 * 3_600_000), plan, gpx, setups);
    tell(index + 1, plans.length);
  }
}
