import { describe, expect, it } from "vitest";
import { smoothedTrackFromSpeed } from "@/tests/support/smoothed-track-from-speed";
import { courseColumns, wrapAngle } from "./course";
import { findOnFoil } from "./on-foil";
import { findTurns } from "./turns";
import { foilMask } from "./way";
import { windFromBumps } from "./wind-from-bumps";
import { windFromLegs } from "./wind-from-legs";

const LEG_S = 40;
const TURN_S = 6;
const WAIT_S = 60;
const LEGS = 9;
const LASTS_S = WAIT_S + LEGS * (LEG_S + TURN_S) + 30;

/**
 * A wing rider: a minute adrift before the wind, then legs 100 degrees off the wind on either hand with a turn of 6 s
 * between. Turn k is a gybe (stern through the wind) unless `tacks` says it is a tack.
 */
function wing(windFromDeg: number, tacks: (turn: number) => boolean = () => false) {
  const courseDeg = (t: number): number => {
    const sailed = t - WAIT_S;
    if (sailed < 0 || t > LASTS_S - 30) return windFromDeg + 180;
    const leg = Math.floor(sailed / (LEG_S + TURN_S));
    const into = (sailed - leg * (LEG_S + TURN_S) - LEG_S) / TURN_S;
    const off = leg % 2 === 0 ? 100 : -100;
    if (into < 0 || leg === LEGS - 1) return windFromDeg + off;
    const turned = tacks(leg) ? -off * 2 : (360 - 200) * Math.sign(off);
    return windFromDeg + off + turned * Math.min(1, into);
  };
  const speed = (t: number): number => {
    const sailing = t - WAIT_S;
    return sailing < 0 || t > LASTS_S - 30 ? 0.3 : Math.min(8, 1.4 + 2.5 * sailing);
  };
  const track = smoothedTrackFromSpeed(speed, LASTS_S, { courseDeg });
  const options = { discipline: "wing", trim: null, minimumFlyingSpeedMps: null } as const;
  const { spans } = findOnFoil(track, options);
  return { track, spans, columns: courseColumns(track), onFoil: foilMask(track, spans) };
}

const apart = (a: number, b: number): number =>
  Math.abs((wrapAngle(((a - b) * Math.PI) / 180) * 180) / Math.PI);

describe("windFromLegs", () => {
  it.each([0, 17, 90, 181, 300, 359])(
    "finds a wind from %i degrees by legs that mirror each other",
    (windFromDeg) => {
      const { track, columns, spans, onFoil } = wing(windFromDeg);
      // 2 degrees: bins of one degree, and the turns' own courses.
      expect(apart(windFromLegs(track, columns, spans, onFoil) ?? NaN, windFromDeg)).toBeLessThanOrEqual(2);
    },
  );

  it("says nothing from less than a minute of legs", () => {
    const { track, columns } = wing(90);
    expect(windFromLegs(track, columns, [], foilMask(track, []))).toBeNull();
  });
});

describe("findTurns", () => {
  it("finds every gybe at the moment the course crosses the axis, foil kept", () => {
    const { track, columns, spans } = wing(40);
    const turns = findTurns(track, columns, spans, 40);
    const whole = turns.filter((turn) => turn.keptFoil);
    expect(whole).toHaveLength(LEGS - 1);
    whole.forEach((turn, k) => {
      expect(turn.kind).toBe("gybe");
      const middleS = WAIT_S + k * (LEG_S + TURN_S) + LEG_S + TURN_S / 2;
      expect(Math.abs((turn.timeMs - track.startMs) / 1000 - middleS)).toBeLessThan(0.26);
      expect(turn.startMs).toBeLessThan(turn.timeMs);
      expect(turn.endMs).toBeGreaterThan(turn.timeMs);
    });
  });

  it("tells tacks from gybes", () => {
    const { track, columns, spans } = wing(250, (turn) => turn % 3 === 1);
    const kinds = findTurns(track, columns, spans, 250)
      .filter((turn) => turn.keptFoil)
      .map((turn) => turn.kind);
    expect(kinds).toEqual(["gybe", "tack", "gybe", "gybe", "tack", "gybe", "gybe", "tack"]);
  });

  it("calls a turn that ended in the water lost, at the touchdown", () => {
    const made = wing(40);
    const perS = 1000 / made.track.stepMs;
    // The second gybe begins at 60 + 46 + 40 s; the foil is lost two seconds into it and flies again 20 s later.
    const downS = WAIT_S + LEG_S + TURN_S + LEG_S + 2;
    const spans = [
      { start: (WAIT_S + 2) * perS, end: downS * perS, confidence: 1 },
      { start: (downS + 20) * perS, end: (LASTS_S - 32) * perS, confidence: 1 },
    ];
    const lost = findTurns(made.track, made.columns, spans, 40).filter((turn) => !turn.keptFoil);
    expect(lost[0]?.kind).toBe("gybe");
    expect(((lost[0]?.timeMs ?? 0) - made.track.startMs) / 1000).toBeCloseTo(downS, 6);
  });
});

describe("windFromBumps", () => {
  it("is opposite to the course on which a downwinder speeds up", () => {
    const surging = (t: number): number => (t < 20 ? 1.4 : 6 + 1.2 * Math.sin((2 * Math.PI * t) / 9));
    // Up the course on the rise, 30 degrees off it on the fall.
    const courseDeg = (t: number): number => (Math.cos((2 * Math.PI * t) / 9) > 0 ? 70 : 100);
    const track = smoothedTrackFromSpeed(surging, 400, { courseDeg });
    const spans = [{ start: 80, end: 1580, confidence: 1 }];
    const from = windFromBumps(track, courseColumns(track), spans, foilMask(track, spans));
    // The few samples near the turning points carry the weight of 0.05 m/s2.
    expect(apart(from ?? NaN, 250)).toBeLessThan(3);
  });
});
