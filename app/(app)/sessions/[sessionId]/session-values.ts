import { formatTime } from "@/lib/display/format-time";
import { speedFromMps, type SpeedUnit } from "@/lib/units/speed";
import type { SessionDetail } from "@/lib/server/sessions/get-session";

const typed = (value: number | null, decimals: number): string =>
  value === null ? "" : String(Number(value.toFixed(decimals)));

/** What a rider said about a session, as the details form shows it. A field sent back as it was shown stays as it is stored. */
export function detailValues(session: SessionDetail, speedUnit: SpeedUnit): Record<string, string> {
  const { windSpeedMps } = session;
  return {
    title: session.title,
    spot: session.spot,
    discipline: session.discipline,
    windFromDeg: typed(session.windFromDeg, 1),
    windSpeedMps: typed(windSpeedMps === null ? null : speedFromMps(windSpeedMps, speedUnit), 1),
    wavePeriodS: typed(session.wavePeriodS, 1),
    waveHeightM: typed(session.waveHeightM, 2),
    water: session.water ?? "",
    notes: session.notes,
  };
}

/** The ends of a session on the clock of its place. */
export function trimValues(session: SessionDetail): Record<string, string> {
  return {
    trimStart: formatTime(session.startMs, session.timeZone, "seconds"),
    trimEnd: formatTime(session.endMs, session.timeZone, "seconds"),
  };
}

type Span = { readonly setupId: string; readonly startMs: number; readonly endMs: number };

/** The gear spans as rows of the form; an end that is the session's own stays empty. */
export function gearValues(session: SessionDetail, spans: readonly Span[]): Record<string, string> {
  const clock = (timeMs: number) => formatTime(timeMs, session.timeZone, "seconds");
  const values: Record<string, string> = { gearRows: String(Math.max(1, spans.length)) };
  for (const [row, span] of spans.entries()) {
    values[`gear-setup-${row}`] = span.setupId;
    values[`gear-from-${row}`] = span.startMs <= session.startMs ? "" : clock(span.startMs);
    values[`gear-to-${row}`] = span.endMs >= session.endMs ? "" : clock(span.endMs);
  }
  return values;
}
