import {
  type GaussMarkov,
  type SingerModel,
  singerTerms,
  type TransitionTerms,
} from "@/lib/numeric/transition-terms";

/**
 * Shape of a receiver's error, as multiples of the noise scale (the slow part's standard deviation a axis) and correlation times in seconds:
 * a slow part (atmosphere, satellites), a fast part (reflections, the receiver's own filter) and a white rest.
 * The proportions are from trials on modelled and recorded tracks, not from a publication.
 */
export const ERROR_SHAPE = { slow: 1, slowTimeS: 45, fast: 0.35, fastTimeS: 3, white: 0.13 } as const;

/** White variance that stays however good the receiver: rounding in files and clocks, m2. */
const WHITE_FLOOR_M2 = 0.003;

/** What a foiler can do: standard deviation of acceleration (m/s2) and how long it lasts (s). */
export type Agility = GaussMarkov;

/** Stiff: finds states and turning points without chasing noise. */
export const STIFF: Agility = { sd: 0.8, timeS: 2 };
/** Looser: keeps the way of a path that weaves, for lengths and bests. */
export const LOOSE: Agility = { sd: 1.3, timeS: 1.5 };

/** A smoother's setting: the motion allowed, the receiver's noise scale in metres, the file's rounding. */
export type SmootherSettings = {
  readonly agility: Agility;
  readonly noiseScaleM: number;
  /** White variance beyond the usual shape, m2: rounding of coordinates in the file, a receiver whose noise is nearly white. */
  readonly extraWhiteM2: number;
};

/**
 * The Singer model with both correlated errors for a setting.
 *
 * @example
 * singerModel({ agility: { sd: 1, timeS: 2 }, noiseScaleM: 2, extraWhiteM2: 0 }).slowError.sd; // 2
 */
export function singerModel(settings: SmootherSettings): SingerModel {
  const scale = settings.noiseScaleM;
  return {
    acceleration: settings.agility,
    fastError: { sd: ERROR_SHAPE.fast * scale, timeS: ERROR_SHAPE.fastTimeS },
    slowError: { sd: ERROR_SHAPE.slow * scale, timeS: ERROR_SHAPE.slowTimeS },
  };
}

/**
 * Variance of the white part of a position, m2: the receiver's usual share and what is beyond it.
 *
 * @example
 * whiteVarianceM2(0, 0.1); // 0.103
 */
export function whiteVarianceM2(noiseScaleM: number, extraWhiteM2: number): number {
  return (ERROR_SHAPE.white * noiseScaleM) ** 2 + WHITE_FLOOR_M2 + extraWhiteM2;
}

/**
 * The transition over a step for a setting, as the smoother asks for it.
 *
 * @example
 * settingsTerms({ agility: { sd: 1, timeS: 2 }, noiseScaleM: 2, extraWhiteM2: 0 })(3)[0]; // 3
 */
export function settingsTerms(settings: SmootherSettings): (stepS: number) => TransitionTerms {
  const model = singerModel(settings);
  return (stepS) => singerTerms(stepS, model);
}
