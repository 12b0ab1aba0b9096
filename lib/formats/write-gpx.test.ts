import { DOMParser } from "@xmldom/xmldom";
import { describe, expect, it } from "vitest";
import { writeGpx } from "./write-gpx";
import { fixtureBytes, gpxDocument, point, readOk } from "@/tests/support/reading";

const written = (...input: Parameters<typeof writeGpx>): string => [...writeGpx(...input)].join("");

describe("writeGpx", () => {
  it.each(["gpx/31_08_2019.gpx", "gpx/run.gpx", "tcx/two-laps.tcx", "kml/gx-track.kml", "fit/activity.fit"])(
    "gives back what was read of %s",
    async (name) => {
      const { fixes, title } = await readOk(fixtureBytes(name));
      const again = await readOk(written(fixes, { title }));
      expect(again.title).toBe(title);
      expect(again.notes).toEqual([]);
      expect([...again.fixes.segmentStarts]).toEqual([...fixes.segmentStarts]);
      expect([...again.fixes.timeMs]).toEqual([...fixes.timeMs]);
      const close = (ours: Float64Array | null, theirs: Float64Array | null, tolerance: number): void => {
        expect(ours?.length).toBe(theirs?.length);
        ours?.forEach((value, index) => {
          if (Number.isNaN(value)) expect(theirs?.[index]).toBeNaN();
          else expect(Math.abs(value - (theirs?.[index] ?? Number.NaN))).toBeLessThanOrEqual(tolerance);
        });
      };
      // Tolerances are half of the last decimal that is written.
      close(fixes.latDeg, again.fixes.latDeg, 0.5e-9);
      close(fixes.lonDeg, again.fixes.lonDeg, 0.5e-9);
      close(fixes.elevationM, again.fixes.elevationM, 0.501e-3);
      close(fixes.receiverSpeedMps, again.fixes.receiverSpeedMps, 0.501e-3);
      close(fixes.heartRateBpm, again.fixes.heartRateBpm, 0);
    },
  );

  it("stays within GPX 1.1: order of the children, no 180, no exponents, a title of any letters", async () => {
    const { fixes } = await readOk(
      gpxDocument(
        point(0, "<ele>-0.00001</ele><sat>9</sat><hdop>0.8</hdop><speed>2</speed>", 0.0000001, 180) +
          point(1, "", 1e-7, "-0.0000001"),
      ),
    );
    const text = written(fixes, { title: 'R&D <"☀"> \u0000 run' });
    expect(text).not.toMatch(/\de-\d|lon="180"/);
    // Source: GPX 1.1 schema, wptType: ele, time, ..., sat, hdop, ..., extensions in this order.
    expect(text).toMatch(/<ele>0<\/ele><time>[^<]+<\/time><sat>9<\/sat><hdop>0.8<\/hdop><extensions>/);
    const document = new DOMParser().parseFromString(text, "text/xml");
    expect(document.getElementsByTagName("name")[0]?.textContent).toBe('R&D <"☀">   run');
    expect(document.documentElement?.namespaceURI).toBe("http://www.topografix.com/GPX/1/1");
  });
});
