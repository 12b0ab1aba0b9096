import type { SmoothedTrack } from "@/lib/track/smoothed-track";
import type { FoilSpan } from "./on-foil";

/**
 * Off the foil a floating rider is swung to and fro by the waves; that is no way made. There the way is the net
 * displacement over this time, about one wave period. On foil and above paddling pace it is the speed itself.
 */
const NET_S = 8;
const NET_BELOW_MPS = 2;
const SPEED_ABOVE_MPS = 3;

/** Longest hole between fixes over which the way is carried on (s); metrics 2 bridges short dropouts only. */
export const BRIDGED_GAP_S_MAX = 25;

/** Net speed over a centred window (m/s): displacement by time, over what exists near the ends. */
function netSpeedAt(track: SmoothedTrack, i: number, half: number): number {
  const a = Math.max(0, i - half);
  const b = Math.min(track.count - 1, i + half);
  if (b === a) return 0;
  const dx = (track.xM[b] ?? 0) - (track.xM[a] ?? 0);
  const dy = (track.yM[b] ?? 0) - (track.yM[a] ?? 0);
  return Math.hypot(dx, dy) / (((b - a) * track.stepMs) / 1000);
}

/**
 * 1 for every sample inside a span, 0 elsewhere. Length: count of the track.
 */
export function foilMask(track: SmoothedTrack, spans: readonly FoilSpan[]): Uint8Array {
  const mask = new Uint8Array(track.count);
  for (const span of spans) mask.fill(1, Math.ceil(span.start), Math.floor(span.end) + 1);
  return mask;
}

/**
 * Cumulated way under way, metres from the first sample: never falling, constant ashore and over holes in the
 * recording longer than 25 s.
 *
 * On foil: the integral of the loose speed. Off foil: of the net speed over 8 s (the waves' to-and-fro is not way),
 * passing over to the speed itself between 2 and 3 m/s. In: the track and its on-foil mask. Out: one value a
 * sample. The windows are common practice, no source.
 */
export function cumulatedWayM(track: SmoothedTrack, onFoil: ArrayLike<number>): Float64Array {
  const half = Math.round((NET_S * 500) / track.stepMs);
  const stepS = track.stepMs / 1000;
  const way = new Float64Array(track.count);
  let before = 0;
  for (let i = 0; i < track.count; i++) {
    let speed = 0;
    if (track.onWater[i] === 1 && (track.gapS[i] ?? 0) <= BRIDGED_GAP_S_MAX) {
      const loose = track.speedMpsLoose[i] ?? 0;
      if (onFoil[i] === 1) speed = loose;
      else {
        const net = netSpeedAt(track, i, half);
        const share = Math.max(0, Math.min(1, (net - NET_BELOW_MPS) / (SPEED_ABOVE_MPS - NET_BELOW_MPS)));
        speed = net + share * (loose - net);
      }
    }
    if (i > 0) way[i] = (way[i - 1] ?? 0) + 0.5 * (before + speed) * stepS;
    before = speed;
  }
  return way;
}
