import { expect, test } from "vitest";
import { cleanFileName, fileNameFromHeader } from "./file-name";

test.each([
  ["../../etc/passwd", "passwd"],
  ["C:\\tracks\\run.gpx", "run.gpx"],
  ["a\r\nSet-Cookie: x.gpx", "aSet-Cookie: x.gpx"],
  ["run\u202Excod.gpx", "runxcod.gpx"],
  ["", "track"],
  ["   ", "track"],
  ["🌊 bølge.gpx", "🌊 bølge.gpx"],
])("the name %j is shown as %j", (name, shown) => {
  expect(cleanFileName(name)).toBe(shown);
});

test("a name of 10,000 letters is cut in the middle and keeps its ending", () => {
  const shown = cleanFileName(`${"x".repeat(10_000)}.gpx.gz`);
  expect(shown.length).toBe(200);
  expect(shown.endsWith(".gpx.gz")).toBe(true);
});

test("a header that is not percent-encoded is kept as it came", () => {
  expect(fileNameFromHeader("100%.gpx")).toBe("100%.gpx");
  expect(fileNameFromHeader(null)).toBe("track");
});
