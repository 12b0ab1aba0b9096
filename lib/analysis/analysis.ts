import type { QualityReport } from "@/lib/track/quality";
import type { SpeedSeries, Stretch } from "@/lib/track/speed-series";

/** Raised whenever a change alters any figure; stored with every result. */
export const ANALYSIS_VERSION = 5;

export type Discipline = "downwind" | "wing" | "other";

/** What the rider has said about the session; everything else is worked out from the track. */
export type AnalysisOptions = {
  readonly discipline: Discipline;
  /** The rider's own ends of the session, or null for the detected on-water window. */
  readonly trim: Stretch | null;
  /** Lowest flying speed of the setup, when known (m/s). */
  readonly minimumFlyingSpeedMps: number | null;
};

export type OnFoilSegment = Stretch & {
  readonly distanceM: number;
  readonly speedMpsMean: number;
  readonly speedMpsMax: number;
  readonly bearingDeg: number;
  /** Mean posterior margin of the two-state path, 0 to 1. */
  readonly confidence: number;
  /** Seconds of effort (rising speed off foil) before the take-off. */
  readonly takeoffEffortS: number;
};

/** From the up-crossing to the down-crossing of the middle between a peak and its neighbouring lulls. */
export type BumpRide = Stretch & {
  readonly peakMs: number;
  readonly speedMpsPeak: number;
  readonly gainMps: number;
  readonly distanceM: number;
};

/** From a peak of speed to the next lull on foil: the foil pays for its way with energy height. */
export type Lull = Stretch & {
  readonly distanceM: number;
  readonly heightLostM: number;
  readonly keptFoil: boolean;
};

export const BEST_TIME_KEYS = ["s2", "s10", "s60", "s600", "s3600"] as const;
export const BEST_DISTANCE_KEYS = ["m100", "m250", "m500", "m1000", "nm"] as const;
export type BestKey = (typeof BEST_TIME_KEYS)[number] | (typeof BEST_DISTANCE_KEYS)[number];

export type Best = Stretch & { readonly speedMps: number; readonly seMps: number };

/** Why a best is missing: the session is shorter than the window, or the quality is below B. */
export type Withheld = { readonly withheld: "too_short" | "quality" };

export type BumpFigures = {
  readonly ridingSpeedMps: number;
  readonly ridingSpeedSeMps: number;
  readonly rides: number;
  readonly ridesPerKm: number;
  readonly ridesPerHour: number;
  readonly gainMpsMean: number;
  readonly intervalSMedian: number;
  readonly lullsKeptShare: number;
};

/** Pooled metres per metre of energy height with a bootstrap interval over lulls (95 %). */
export type GlideFigures = {
  readonly ratio: number;
  readonly ratioLow: number;
  readonly ratioHigh: number;
  readonly lulls: number;
};

/** Every figure of a session or of a brushed stretch of it. Shares are 0 to 1. Null: not enough data for it. */
export type Figures = Stretch & {
  readonly elapsedS: number;
  readonly movingS: number;
  readonly waterDistanceM: number;
  readonly waterDistanceSeM: number;
  readonly onFoilDistanceM: number;
  readonly onFoilTimeS: number;
  readonly onFoilShareOfDistance: number;
  readonly onFoilShareOfTime: number;
  readonly takeoffs: number;
  readonly touchdowns: number;
  readonly longestSegmentM: number;
  readonly longestSegmentS: number;
  readonly bests: Readonly<Record<BestKey, Best | Withheld>>;
  readonly bestTens: readonly Best[];
  readonly bestTensMeanMps: number | null;
  readonly bumps: BumpFigures | null;
  readonly glide: GlideFigures | null;
};

/** What `summarise` needs to work every figure out again for a stretch; all of it is sent to the client. */
export type AnalysedTrack = {
  readonly series: SpeedSeries;
  readonly segments: readonly OnFoilSegment[];
  readonly bumpRides: readonly BumpRide[];
  readonly lulls: readonly Lull[];
  readonly quality: QualityReport;
};

export type Turn = Stretch & {
  readonly timeMs: number;
  readonly kind: "tack" | "gybe";
  readonly keptFoil: boolean;
};

export type Analysis = AnalysedTrack & {
  readonly version: number;
  /** Sum of the geodesic steps of the raw fixes inside segments, before any cleaning. */
  readonly rawLengthM: number;
  readonly rawFixes: number;
  readonly rawSegments: number;
  readonly firstFixMs: number;
  readonly lastFixMs: number;
  /** The detected or hand-set on-water window and the times on the water inside it. */
  readonly window: Stretch;
  readonly waterSessions: readonly Stretch[];
  readonly figures: Figures;
  /** Tacks and gybes of a wing session in order of time; empty for other disciplines. */
  readonly turns: readonly Turn[];
  /** Where the wind came from by the rider's own courses (degrees true); null when they do not tell. */
  readonly windFromDeg: number | null;
};
