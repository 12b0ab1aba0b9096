import type { Figures } from "@/lib/analysis/analysis";
import type { GearBar } from "@/components/chart/timeline-strips";
import type { DistanceUnit } from "@/lib/units/length";
import type { SpeedUnit } from "@/lib/units/speed";

/** What the session page hands to its client part: figures for the first paint and how to get the rest. */
export type SessionData = {
  readonly id: string;
  readonly title: string;
  /** Changes whenever the stored track does. */
  readonly revision: string;
  readonly timeZone: string;
  readonly discipline: "downwind" | "wing" | "other";
  readonly figures: Figures;
  readonly gear: readonly GearBar[];
  readonly places: readonly { readonly name: string; readonly lat: number; readonly lon: number }[];
  readonly windFromDeg: number | null;
  readonly units: { readonly speed: SpeedUnit; readonly distance: DistanceUnit };
};
