import { describe, expect, test } from "vitest";
import { isTrackName } from "./dropped-files";
import { answer } from "./send-file";

describe("the server's answer to a file", () => {
  test("is stored for 201 and for a file that was there already", () => {
    expect(answer(201, '{"uploadId":"u1"}')).toEqual({ ok: true, uploadId: "u1" });
    expect(answer(200, '{"uploadId":"u1"}')).toEqual({ ok: true, uploadId: "u1" });
  });

  test("is its own sentence when it refuses; trying again helps only where it can", () => {
    expect(answer(413, '{"title":"The file is larger than 50 MB."}')).toEqual({
      ok: false,
      message: "The file is larger than 50 MB.",
      again: false,
      signedOut: false,
    });
    expect(answer(507, '{"title":"No room."}')).toMatchObject({ again: true });
    expect(answer(401, '{"title":"Sign in to go on."}')).toMatchObject({ signedOut: true });
  });

  test("is told in our words when it is a page of somebody else's", () => {
    expect(answer(502, "<html>Bad gateway</html>")).toMatchObject({
      ok: false,
      message: "The file could not be sent (the server answered 502). Try again.",
    });
    expect(answer(200, "<html>Log in to this network</html>")).toMatchObject({ ok: false });
  });
});

test.each([
  ["run.GPX", true],
  ["run.fit.gz", true],
  [".hidden.gpx", false],
  ["photo.jpg", false],
])("%s in a folder is taken: %s", (name, taken) => {
  expect(isTrackName(name)).toBe(taken);
});
