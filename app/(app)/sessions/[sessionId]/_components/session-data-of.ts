import type { SessionData } from "@/components/session/session-data";
import { compassPoint } from "@/lib/display/format-bearing";
import { formatNumber } from "@/lib/display/format-number";
import { speedWithUnit } from "@/lib/display/format-speed";
import { formatLongDate, formatTimeSpan } from "@/lib/display/format-time";
import type { listGearSpans, SetupWithUse } from "@/lib/server/gear/read-gear";
import type { listPlaces } from "@/lib/server/places/list-places";
import type { SessionDetail } from "@/lib/server/sessions/get-session";

type Units = SessionData["units"];

const DISCIPLINE_WORDS = { downwind: "Downwinder", wing: "Wing", other: "Session" } as const;

function windWords(session: SessionDetail, units: Units): string {
  const from = session.windFromDeg === null ? "" : ` from ${compassPoint(session.windFromDeg)}`;
  if (session.windSpeedMps !== null)
    return `Wind ${speedWithUnit(session.windSpeedMps, units.speed)}${from}.`;
  return from === "" ? "" : `Wind${from}.`;
}

function waveWords(session: SessionDetail): string {
  const height = session.waveHeightM === null ? null : `${formatNumber(session.waveHeightM, 1)}\u00a0m`;
  const period = session.wavePeriodS === null ? null : `${formatNumber(session.wavePeriodS, 1)}\u00a0s`;
  if (height === null && period === null) return "";
  return `Bumps ${[height, period].filter((words) => words !== null).join(", ")}.`;
}

/** The sentence under the title: what, when, the day, and what the recording is worth. */
export function sessionSentence(session: SessionDetail, units: Units): string {
  const { startMs, endMs, timeZone } = session;
  const day = formatLongDate(startMs, timeZone);
  const what = `${DISCIPLINE_WORDS[session.discipline]}, ${day}, ${formatTimeSpan(startMs, endMs, timeZone)}.`;
  const where = session.spot === "" ? "" : `${session.spot}.`;
  const quality = `Quality ${session.qualityGrade}.`;
  return [what, where, windWords(session, units), waveWords(session), quality]
    .filter((words) => words !== "")
    .join(" ");
}

/** What the page's client part needs of the rows. */
export function sessionData(
  session: SessionDetail,
  rows: {
    spans: Awaited<ReturnType<typeof listGearSpans>>;
    setups: readonly SetupWithUse[];
    places: Awaited<ReturnType<typeof listPlaces>>;
    units: Units;
  },
): SessionData {
  const names = new Map(rows.setups.map((setup) => [setup.id, setup.name]));
  return {
    id: session.id,
    title: session.title,
    revision: [session.analysisVersion, session.discipline, session.startMs, session.endMs].join("-"),
    timeZone: session.timeZone,
    discipline: session.discipline,
    figures: session.figures,
    gear: rows.spans.map(({ setupId, startMs, endMs }) => ({
      setupId,
      startMs,
      endMs,
      label: names.get(setupId) ?? "",
    })),
    places: rows.places.map((place) => ({ name: place.name, lat: place.latDeg, lon: place.lonDeg })),
    windFromDeg: session.windFromDeg,
    units: rows.units,
  };
}
