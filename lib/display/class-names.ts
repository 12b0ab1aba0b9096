/**
 * Joins class names, leaving out whatever is false, null or empty.
 *
 * @example
 * classNames("frame", false, null, "p-2"); // "frame p-2"
 */
export function classNames(...names: readonly (string | false | null | undefined)[]): string {
  return names.filter(Boolean).join(" ");
}
