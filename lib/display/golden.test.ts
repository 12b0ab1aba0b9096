import { describe, expect, it } from "vitest";
import { bearingInWords, compassPoint, formatBearing, windAngleInWords } from "./format-bearing";
import { distanceWithUnit, formatDistance } from "./format-distance";
import { durationInWords, formatDuration } from "./format-duration";
import { formatNumber, formatSigned } from "./format-number";
import * as quantity from "./format-quantity";
import { formatSpeed, formatSpeedChange, speedWithUnit } from "./format-speed";

const NB = "\u00a0";

/*
 * Expected texts are worked by hand from definitions that are exact: knot 1852/3600 m/s and nautical mile 1852 m
 * (SI Brochure 9th ed.), mile 1609.344 m (NIST SP 811, 2008). The 5 to 40 kn rows repeat fixtures/checks/units.json.
 */
const GOLDEN: readonly (readonly [name: string, actual: string, expected: string])[] = [
  ["20 kn in kn", formatSpeed(10.28888888888889, "kn"), "20.0"],
  ["20 kn in km/h", formatSpeed(10.28888888888889, "km/h"), "37.0"],
  ["20 kn in mph", formatSpeed(10.28888888888889, "mph"), "23.0"],
  ["12 kn in m/s", formatSpeed(6.173333333333333, "m/s"), "6.2"],
  ["7.5 m/s in kn", formatSpeed(7.5, "kn"), "14.6"],
  ["7.5 m/s in km/h", speedWithUnit(7.5, "km/h"), `27.0${NB}km/h`],
  ["18 kn with unit", speedWithUnit(9.26, "kn"), `18.0${NB}kn`],
  ["standing still", speedWithUnit(0, "kn"), `0.0${NB}kn`],
  ["missing speed has no unit", speedWithUnit(null, "kn"), "–"],
  ["speed that is not a number", formatSpeed(NaN, "kn"), "–"],
  ["1 kn slower", formatSpeedChange(-1852 / 3600, "kn"), "\u22121.0"],
  ["half a knot faster", formatSpeedChange(0.25722222, "kn"), "+0.5"],
  ["one nautical mile", distanceWithUnit(1852, "NM"), `1.00${NB}NM`],
  ["half a nautical mile is the first in NM", distanceWithUnit(926, "NM"), `0.50${NB}NM`],
  ["under half a nautical mile in metres", distanceWithUnit(925, "NM"), `925${NB}m`],
  ["26.84 km", distanceWithUnit(26840, "km"), `26.84${NB}km`],
  ["999 m", distanceWithUnit(999.4, "km"), `999${NB}m`],
  ["ten miles", distanceWithUnit(16093.44, "mi"), `10.00${NB}mi`],
  ["a column never changes its unit", formatDistance(250, "NM"), "0.13"],
  ["missing distance", distanceWithUnit(null, "NM"), "–"],
  ["an hour, eight minutes", formatDuration(4121), "1:08:41"],
  ["a second short of a minute rounds up whole", formatDuration(59.96, 1), "0:01:00.0"],
  ["tenths", formatDuration(3723.45, 1), "1:02:03.5"],
  ["ten hours", formatDuration(36000), "10:00:00"],
  ["behind the gun", formatDuration(-5), "\u22120:00:05"],
  ["an hour and ten in words", durationInWords(4200), `1${NB}h 10${NB}min`],
  ["59 min 59.6 s is an hour", durationInWords(3599.6), `1${NB}h`],
  ["12 min 30 s in words", durationInWords(750), `12${NB}min 30${NB}s`],
  ["north-east", formatBearing(45), "045°"],
  ["just left of north is 000, not 360", formatBearing(359.7), "000°"],
  ["minus ninety is west", formatBearing(-90), "270°"],
  ["west-south-west", compassPoint(247), "WSW"],
  ["north from below", compassPoint(349), "N"],
  ["from south-west", bearingInWords(225), "225° (SW)"],
  ["port tack angle", windAngleInWords(-45.2), "45° port"],
  ["past dead downwind is the other side", windAngleInWords(190), "170° port"],
  ["on-foil share", quantity.shareWithUnit(0.914), `91${NB}%`],
  ["front wing area", quantity.foilAreaWithUnit(0.09), `900${NB}cm²`],
  ["hand wing area", quantity.wingAreaWithUnit(4.5), `4.5${NB}m²`],
  ["mast length", quantity.millimetresWithUnit(0.82), `820${NB}mm`],
  ["shim", quantity.formatAngle(0.5), "+0.5°"],
  ["no shim has no sign", quantity.formatAngle(0), "0.0°"],
  ["mass", quantity.massWithUnit(84.6), `85${NB}kg`],
  ["water temperature", quantity.temperatureWithUnit(14.5), `14.5${NB}°C`],
  ["wave period", quantity.secondsWithUnit(4.6), `4.6${NB}s`],
  ["wave height", quantity.heightWithUnit(1.25, 2), `1.25${NB}m`],
  ["a rounded-away minus disappears", formatNumber(-0.04, 1), "0.0"],
  ["a rounded-away plus disappears", formatSigned(0.04, 1), "0.0"],
];

describe("quantities as text", () => {
  it.each(GOLDEN)("%s", (_name, actual, expected) => {
    expect(actual).toBe(expected);
  });

  it("holds at least forty rows and none of the forms the trade does not write", () => {
    expect(GOLDEN.length).toBeGreaterThanOrEqual(40);
    for (const [, actual] of GOLDEN) expect(actual).not.toMatch(/\b(kts|knts|KN|deg)\b/);
  });
});
