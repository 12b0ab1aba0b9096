/**
 * An angle brought into [-180, 180): for longitudes and for the difference of two of them, so that a step over the
 * antimeridian stays short. NaN and infinities give NaN.
 *
 * @example
 * wrapLongitudeDeg(359.5); // -0.5
 */
export function wrapLongitudeDeg(angleDeg: number): number {
  if (angleDeg >= -180 && angleDeg < 180) return angleDeg;
  return ((((angleDeg + 180) % 360) + 360) % 360) - 180;
}

/**
 * An angle brought into [0, 360): for courses and bearings. NaN and infinities give NaN.
 *
 * @example
 * wrapBearingDeg(-90); // 270
 */
export function wrapBearingDeg(angleDeg: number): number {
  const wrapped = ((angleDeg % 360) + 360) % 360;
  return wrapped === 360 ? 0 : wrapped;
}
