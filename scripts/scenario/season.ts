import type { Rng } from "@/lib/numeric/rng";
import type { Position } from "./motion";

/** Invented riders of an invented club; the coast is real. Positions lie on the water just off the beach. */
export const SPOTS = {
  thorupstrand: { name: "Thorupstrand", at: { latDeg: 57.139, lonDeg: 9.092 } },
  slettestrand: { name: "Slettestrand", at: { latDeg: 57.1625, lonDeg: 9.344 } },
  blokhus: { name: "Blokhus", at: { latDeg: 57.2555, lonDeg: 9.566 } },
  lokken: { name: "Løkken", at: { latDeg: 57.3735, lonDeg: 9.695 } },
} as const satisfies Record<string, { name: string; at: Position }>;

export type SpotKey = keyof typeof SPOTS;

export type PlannedSession = {
  readonly discipline: "downwind" | "wing";
  readonly from: SpotKey;
  readonly to: SpotKey;
  /** Days after 11 April 2026 and minutes after 08:00 UTC. */
  readonly day: number;
  readonly minute: number;
  readonly windKn: number;
  readonly windFromDeg: number;
  readonly wavePeriodS: number;
  readonly waveHeightM: number;
  /** Names of the setups ridden in order; two split the session in half. */
  readonly setups: readonly string[];
  readonly drive: boolean;
  readonly heartRate: boolean;
  readonly noise: number;
  readonly notes: string;
};

export type DemoRider = {
  readonly email: string;
  readonly weightKg: number;
  readonly skillMps: number;
  readonly sessions: number;
  readonly wingShare: number;
  readonly setups: readonly string[];
};

/** Who rides how often on what; setups are those of `gear.ts`. */
export const RIDERS: readonly DemoRider[] = [
  {
    email: "runa@vestpynt.example",
    weightKg: 74,
    skillMps: 0.2,
    sessions: 30,
    wingShare: 0.1,
    setups: ["Long rail, no shim", "Long rail, half shim", "Long rail, rear 50"],
  },
  {
    email: "odd@vestpynt.example",
    weightKg: 88,
    skillMps: 0.35,
    sessions: 20,
    wingShare: 0.4,
    setups: ["Long rail, no shim", "High aspect 780"],
  },
  {
    email: "maren@vestpynt.example",
    weightKg: 66,
    skillMps: -0.2,
    sessions: 10,
    wingShare: 0.3,
    setups: ["Long rail, no shim", "Long rail, half shim"],
  },
];

/** What each setup is truly worth in the model, m/s on cruise speed: what a comparison may hope to find. */
export const SETUP_EFFECT_MPS: Readonly<Record<string, number>> = {
  "Long rail, no shim": 0,
  "Long rail, half shim": 0.2,
  "Long rail, rear 50": -0.15,
  "High aspect 780": 0.3,
};

const RUNS: readonly (readonly [SpotKey, SpotKey])[] = [
  ["slettestrand", "blokhus"],
  ["slettestrand", "blokhus"],
  ["thorupstrand", "slettestrand"],
  ["blokhus", "lokken"],
];

const NOTES = [
  "",
  "",
  "",
  "Long lulls in the second half.",
  "Sets in threes, easy to link.",
  "Gusty near the beach.",
];

function pick<T>(list: readonly [T, ...T[]] | readonly T[], rng: Rng): T {
  const chosen = list[Math.floor(rng() * list.length)];
  if (chosen === undefined) throw new Error("nothing to pick from");
  return chosen;
}

/** A rider's season, one session after the other, from one seed. */
export function planSeason(rider: DemoRider, rng: Rng): PlannedSession[] {
  const gap = 190 / rider.sessions;
  return Array.from({ length: rider.sessions }, (_, i) => {
    const wing = rng() < rider.wingShare;
    const [from, to] = wing ? (["blokhus", "blokhus"] as const) : pick(RUNS, rng);
    const windKn = 13 + Math.round(rng() * 12);
    const first = pick(rider.setups, rng);
    const second = pick(rider.setups, rng);
    return {
      discipline: wing ? "wing" : "downwind",
      from,
      to,
      day: Math.round(i * gap + rng() * gap * 0.8),
      minute: 60 + Math.floor(rng() * 480),
      windKn,
      windFromDeg: 235 + Math.round(rng() * 30),
      wavePeriodS: 3.4 + Math.round(rng() * 24) / 10,
      waveHeightM: 0.6 + Math.round((windKn - 12) * 0.8) / 10,
      setups: rng() < 0.25 && second !== first ? [first, second] : [first],
      drive: !wing && rng() < 0.3,
      heartRate: rng() < 0.6,
      noise: rng() < 0.8 ? 1 : 2,
      notes: pick(NOTES, rng),
    };
  });
}
