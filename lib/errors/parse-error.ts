/** Why a file is refused. Each code has one sentence of copy (see refusalText in lib/display). */
export type ParseErrorCode =
  | "empty"
  | "unknown_format"
  | "not_well_formed"
  | "doctype"
  | "too_large_unpacked"
  | "too_many_fixes"
  | "too_deep"
  | "too_many_attributes"
  | "attribute_too_long"
  | "text_too_long"
  | "too_many_files"
  | "nested_archive"
  | "broken_archive"
  | "no_track"
  | "no_times"
  | "too_few_fixes"
  | "broken_fit"
  | "took_too_long"
  | "out_of_memory";

/**
 * A file that cannot be read as a track. `message` is a sentence for the rider that says what was found;
 * `format` and `place` (byte or line) help whoever looks into it.
 *
 * @example
 * new ParseError("empty", "The file is empty.", { format: "unknown" }).code; // "empty"
 */
export class ParseError extends Error {
  readonly code: ParseErrorCode;
  readonly format: string;
  readonly place: string | null;

  constructor(
    code: ParseErrorCode,
    message: string,
    options: { format?: string; place?: string | null; cause?: unknown } = {},
  ) {
    super(message, options.cause === undefined ? undefined : { cause: options.cause });
    this.name = "ParseError";
    this.code = code;
    this.format = options.format ?? "unknown";
    this.place = options.place ?? null;
  }
}
