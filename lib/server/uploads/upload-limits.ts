import type { ThrottleRule } from "@/lib/server/throttle/throttle";

const HOUR_MS = 3_600_000;

/** The most one file may have as it is sent, 50 MB: four hours at 10 Hz as plain GPX. */
export const FILE_BYTES_MAX = 50_000_000;
/** Files chosen or dropped at once. */
export const FILES_AT_ONCE_MAX = 50;
/** What one account may keep: about 4,000 usual recordings. */
export const QUOTA_BYTES = 2_000_000_000;
/** A sender that is silent for this long has gone. */
export const IDLE_MS = 60_000;

/** Room for a rider who brings years of recordings in folders of 50; a script is stopped all the same. */
export const UPLOADS_PER_HOUR: ThrottleRule = {
  name: "upload_hour",
  free: 200,
  windowMs: HOUR_MS,
  waitMaxMs: null,
};
export const UPLOADS_PER_DAY: ThrottleRule = {
  name: "upload_day",
  free: 1000,
  windowMs: 24 * HOUR_MS,
  waitMaxMs: null,
};
