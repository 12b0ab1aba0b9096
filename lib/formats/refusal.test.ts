import { describe, expect, it } from "vitest";
import type { ParseErrorCode } from "@/lib/errors/parse-error";
import { refusal } from "./refusal";

/** Every code, by a record that the compiler keeps complete. */
const CODES: Readonly<Record<ParseErrorCode, true>> = {
  empty: true,
  unknown_format: true,
  not_well_formed: true,
  doctype: true,
  too_large_unpacked: true,
  too_many_fixes: true,
  too_deep: true,
  too_many_attributes: true,
  attribute_too_long: true,
  text_too_long: true,
  too_many_files: true,
  nested_archive: true,
  broken_archive: true,
  no_track: true,
  no_times: true,
  too_few_fixes: true,
  broken_fit: true,
  took_too_long: true,
  out_of_memory: true,
};

describe("refusals", () => {
  it.each(Object.keys(CODES) as ParseErrorCode[])(
    "%s says what was found and what to do, in plain words",
    (code) => {
      for (const details of [{}, { found: "It holds a poem", limit: "7", place: "character 9" }]) {
        const { message, code: kept } = refusal(code, details);
        expect(kept).toBe(code);
        // Two sentences or more: what is wrong, and a thing to do that begins with a verb.
        expect(message).toMatch(/^[A-Z].+\. (Export|Choose|Split|Make|Unpack|Pack|Check|Remove)\b.+\.$/);
        expect(message).not.toMatch(/undefined|null|_|\b(invalid|please|sorry|oops|error|exception)\b|!/i);
      }
    },
  );
});
