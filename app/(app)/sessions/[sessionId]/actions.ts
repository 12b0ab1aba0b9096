"use server";

import { revalidatePath } from "next/cache";
import type { FormState } from "@/lib/display/form-state";
import { parseDecimal } from "@/lib/display/parse-decimal";
import { parseDirection } from "@/lib/display/parse-direction";
import { parseLocalTime } from "@/lib/display/parse-local-time";
import { formAction } from "@/lib/server/adapter/form-state";
import { formText } from "@/lib/server/adapter/form-text";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";
import { setGearSpans } from "@/lib/server/gear/set-gear-spans";
import { placeSchema, recordPlace } from "@/lib/server/places/record-place";
import { deleteSession, restoreSession } from "@/lib/server/sessions/delete-session";
import { getSession } from "@/lib/server/sessions/get-session";
import { trimSession } from "@/lib/server/sessions/trim-session";
import { updateSession } from "@/lib/server/sessions/update-session";
import { formatSpeed } from "@/lib/display/format-speed";
import { speedToMps, type SpeedUnit } from "@/lib/units/speed";
import { CLOCK_HINT, gearRows, gearSpansOf, refuse, underFormNames } from "./form-input";
import { detailValues, trimValues } from "./session-values";

const textOf = (form: FormData, name: string) => formText(form, name).trim();

/** The log, the comparison and the session's own page all show what a session's forms change. */
function redraw(sessionId: string): void {
  revalidatePath(`/sessions/${sessionId}`);
  revalidatePath("/sessions");
  revalidatePath("/compare");
}

/** The typed number, null when left empty, the text itself when it is no number (the verb refuses it). */
function numberOf(text: string, unit: string, toSi = (value: number) => value): number | string | null {
  if (text === "") return null;
  const value = parseDecimal(text, unit);
  return value === null ? text : toSi(value);
}

/** Highest wind, wave period and wave height that the verb takes. */
const [WIND_MPS_MAX, PERIOD_S_MAX, HEIGHT_M_MAX] = [60, 30, 20];

/** Errors of the conditions in the units of the form, and so that they can be told apart above it. */
function detailWords(unit: SpeedUnit) {
  const words = {
    windFromDeg: "Enter the wind in degrees from 0 to 360, or as a compass point such as WSW.",
    windSpeedMps: `Enter a wind speed from 0 to ${formatSpeed(WIND_MPS_MAX, unit)} ${unit}.`,
    wavePeriodS: `Enter a wave period from 0 to ${PERIOD_S_MAX} s.`,
    waveHeightM: `Enter a wave height from 0 to ${HEIGHT_M_MAX} m.`,
  };
  return Object.fromEntries(Object.entries(words).map(([name, text]) => [name, { name, text }]));
}

/** Changes what was said about the session; fields that come back as they were shown stay untouched. */
export async function saveDetailsAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    const ctx = await requestContext();
    const { units } = await requireUser(`/sessions/${sessionId}`);
    const shown = detailValues(await getSession(ctx, sessionId), units.speed);
    const text = (name: string) => textOf(form, name);
    const read: Record<string, () => unknown> = {
      title: () => text("title"),
      spot: () => text("spot"),
      discipline: () => text("discipline"),
      windFromDeg: () => (text("windFromDeg") === "" ? null : (parseDirection(text("windFromDeg")) ?? "?")),
      windSpeedMps: () =>
        numberOf(text("windSpeedMps"), units.speed, (value) => speedToMps(value, units.speed)),
      wavePeriodS: () => numberOf(text("wavePeriodS"), "s"),
      waveHeightM: () => numberOf(text("waveHeightM"), "m"),
      water: () => text("water") || null,
      notes: () => text("notes"),
    };
    const changed = Object.entries(read).filter(
      ([name]) => form.has(name) && text(name) !== shown[name]?.trim(),
    );
    if (changed.length === 0) return "Nothing was changed.";
    const change = Object.fromEntries(changed.map(([name, value]) => [name, value()]));
    const names = detailWords(units.speed);
    await underFormNames(names, () => updateSession(ctx, sessionId, change));
    redraw(sessionId);
    return "discipline" in change ? "Saved, and every figure worked out again." : "Details saved.";
  });
}

/** Names the place where the session began, and the one where it ended. */
export async function savePlacesAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    const ctx = await requestContext();
    const fields: Record<string, string> = {};
    const asked = (["start", "end"] as const).flatMap((end) => {
      const name = textOf(form, `${end}Name`);
      if (name === textOf(form, `${end}NameBefore`)) return [];
      const parsed = placeSchema.safeParse({ sessionId, end, name });
      if (!parsed.success) fields[`${end}Name`] = parsed.error.issues[0]?.message ?? "Enter another name.";
      return [{ sessionId, end, name }];
    });
    refuse(fields);
    if (asked.length === 0) return "Nothing was changed.";
    for (const one of asked) {
      await underFormNames({ name: { name: `${one.end}Name` } }, () => recordPlace(ctx, one));
    }
    redraw(sessionId);
    return "Places saved. Titles that are not your own wording follow.";
  });
}

/**
 * Sets both ends by hand, or (button `detected`) goes back to the detected ones. The button may not be named "reset":
 * that would hide the form's own reset, which React calls after an action.
 */
export async function saveTrimAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    const ctx = await requestContext();
    if (textOf(form, "detected") !== "") {
      await trimSession(ctx, sessionId, null);
      redraw(sessionId);
      return "The ends are the detected ones again, and every figure was worked out again.";
    }
    const session = await getSession(ctx, sessionId);
    const shown = trimValues(session);
    const fields: Record<string, string> = {};
    const read = (name: "trimStart" | "trimEnd", nowMs: number): number => {
      const text = textOf(form, name);
      // As it was shown: the exact end, which has a fraction of a second that the clock does not show.
      const timeMs = text === shown[name] ? nowMs : parseLocalTime(text, nowMs, session.timeZone);
      if (timeMs === null) fields[name] = CLOCK_HINT;
      return timeMs ?? nowMs;
    };
    const trim = { startMs: read("trimStart", session.startMs), endMs: read("trimEnd", session.endMs) };
    refuse(fields);
    if (trim.startMs === session.startMs && trim.endMs === session.endMs) return "Nothing was changed.";
    const names = { startMs: { name: "trimStart" }, endMs: { name: "trimEnd" } };
    await underFormNames(names, () => trimSession(ctx, sessionId, trim));
    redraw(sessionId);
    return "Trimmed, and every figure worked out again.";
  });
}

/** Says which setup was ridden when; no row at all takes the tags away. */
export async function saveGearAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    const ctx = await requestContext();
    const session = await getSession(ctx, sessionId);
    const count = Math.min(Number.parseInt(textOf(form, "gearRows"), 10) || 0, 30);
    const rows = gearRows((name) => textOf(form, name), count);
    const spans = gearSpansOf(rows, (session.startMs + session.endMs) / 2, session.timeZone);
    await underFormNames({ setupId: { name: "spans" } }, () => setGearSpans(ctx, sessionId, spans));
    redraw(sessionId);
    return spans.length === 0 ? "No setup is tagged." : "What was ridden is saved.";
  });
}

/** Takes the session out of the log; its page says so and brings it back. */
export async function deleteSessionAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    await deleteSession(await requestContext(), sessionId);
    redraw(sessionId);
    return "";
  });
}

/** Brings a deleted session back into the log. */
export async function restoreSessionAction(_: FormState, form: FormData): Promise<FormState> {
  return formAction(form, async () => {
    const sessionId = textOf(form, "sessionId");
    await restoreSession(await requestContext(), sessionId);
    redraw(sessionId);
    return "";
  });
}
