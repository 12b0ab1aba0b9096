const LENGTH_MAX = 200;

/**
 * The name of a file as its sender calls it, fit to be shown and stored: the last part of a path, without control and direction
 * characters, at most 200 characters long. It never names anything on our own disk.
 *
 * @example
 * cleanFileName("../../etc/a\nb.gpx"); // "ab.gpx"
 */
export function cleanFileName(name: string): string {
  const last = name.split(/[/\\]/).at(-1) ?? "";
  const visible = last
    .normalize("NFC")
    .replace(/[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu, "")
    .trim();
  if (visible === "") return "track";
  const characters = [...visible];
  if (characters.length <= LENGTH_MAX) return visible;
  // The end says what kind of file it is.
  return [...characters.slice(0, LENGTH_MAX - 20), "…", ...characters.slice(-19)].join("");
}

/**
 * The `x-file-name` header: percent-encoded UTF-8, as headers carry no other letters. What cannot be decoded is kept as it came.
 *
 * @example
 * fileNameFromHeader("s%C3%B8ndag.gpx"); // "søndag.gpx"
 */
export function fileNameFromHeader(value: string | null): string {
  if (value === null) return "track";
  try {
    return cleanFileName(decodeURIComponent(value));
  } catch {
    return cleanFileName(value);
  }
}
