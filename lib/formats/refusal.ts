import { ParseError, type ParseErrorCode } from "@/lib/errors/parse-error";

/** What a refusal may mention: what was found instead, the limit that was met, where, in which format. */
export type RefusalDetails = {
  readonly found?: string;
  readonly limit?: string;
  readonly format?: string;
  readonly place?: string;
  readonly cause?: unknown;
};

type Sentence = (details: RefusalDetails) => string;

const EXPORT_AGAIN = "Export it again from the watch or the phone.";
const WHAT_WE_READ = "Choose a GPX, TCX, KML or FIT file, plain or gzip-compressed, or a zip of several.";

const SENTENCES: Readonly<Record<ParseErrorCode, Sentence>> = {
  empty: () => `The file is empty. ${EXPORT_AGAIN}`,
  unknown_format: ({ found }) =>
    `${found ?? "It holds something that is not a recorded track"}. ${WHAT_WE_READ}`,
  not_well_formed: ({ place }) =>
    `The file is damaged${place === undefined ? "" : ` at ${place}`}, and too few fixes stand before that. ${EXPORT_AGAIN}`,
  doctype: () =>
    "The file declares a document type (DOCTYPE), which no track needs and which can make a reader fetch or " +
    `blow up things. Remove that line, or export the track again.`,
  too_large_unpacked: ({ limit }) =>
    `Unpacked, the file is larger than ${limit ?? "the limit"}. Split the recording and upload the parts.`,
  too_many_fixes: ({ limit }) =>
    `The file holds more than ${limit ?? "the allowed number of"} fixes. Split the recording and upload the parts.`,
  too_deep: ({ limit }) =>
    `The tags of the file are nested more than ${limit ?? "the allowed number of"} deep, which no track needs. ${EXPORT_AGAIN}`,
  too_many_attributes: ({ limit }) =>
    `A tag of the file has more than ${limit ?? "the allowed number of"} attributes, which no track needs. ${EXPORT_AGAIN}`,
  attribute_too_long: ({ limit }) =>
    `A tag of the file has an attribute longer than ${limit ?? "the limit"}, which no track needs. ${EXPORT_AGAIN}`,
  text_too_long: ({ limit }) =>
    `The file holds a single text or comment longer than ${limit ?? "the limit"}, which no track needs. ${EXPORT_AGAIN}`,
  too_many_files: ({ limit }) =>
    `The zip holds more than ${limit ?? "the allowed number of"} files. Make smaller zips of it.`,
  nested_archive: () => "It is an archive inside an archive. Unpack it once and upload the files it holds.",
  broken_archive: ({ found }) =>
    `${found ?? "The archive is damaged or was cut short"}. Pack it again, or upload the files one by one.`,
  no_track: ({ found }) => `${found ?? "The file holds no track"}. ${WHAT_WE_READ}`,
  no_times: ({ found }) =>
    `${found ?? "It holds points without times"}, so no speed can be worked out. Export the recorded track with its times.`,
  too_few_fixes: ({ limit }) =>
    `The file holds fewer than ${limit ?? "two"} usable fixes, too few for any speed. Check that it is the whole recording.`,
  broken_fit: () =>
    `The FIT file is damaged or was cut short, and too few fixes stand before that. ${EXPORT_AGAIN}`,
  took_too_long: () =>
    "Reading the file took too long and was stopped. Split the recording and upload the parts.",
  out_of_memory: () =>
    "Reading the file needs more memory than a track may take. Split the recording and upload the parts.",
};

/**
 * The refusal of a file as an error with its sentence for the rider: what was found, then what to do.
 *
 * Shapes: `details` fill the blanks of the sentence of `code`. Errors: none, it returns the error to throw.
 *
 * @example
 * refusal("empty").message; // "The file is empty. Export it again from the watch or the phone."
 */
export function refusal(code: ParseErrorCode, details: RefusalDetails = {}): ParseError {
  return new ParseError(code, SENTENCES[code](details), {
    format: details.format ?? "unknown",
    place: details.place ?? null,
    cause: details.cause,
  });
}
