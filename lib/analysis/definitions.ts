/** How a figure is shown; the handbook and the tables choose the reader's own unit by it. */
export type FigureUnit =
  "speed" | "distance" | "duration" | "share" | "count" | "ratio" | "per_km" | "per_hour";

/** What a figure is, in words a rider reads; the code that works it out is in this folder. */
export type FigureDefinition = {
  readonly key: string;
  readonly name: string;
  readonly unit: FigureUnit;
  /** Plain text, in SI. */
  readonly formula: string;
  readonly explanation: string;
  readonly source: string;
  readonly limits: string;
};

const COMMON_PRACTICE = "Common practice, no source.";
const SMOOTHER =
  "Rauch, Tung and Striebel 1965, AIAA Journal 3(8): the smoother behind every speed and position.";

const WAY: readonly FigureDefinition[] = [
  {
    key: "waterDistanceM",
    name: "Distance on the water",
    unit: "distance",
    formula: "on foil: sum of smoothed speed x time; off foil: sum of net displacement over 8 s, by time",
    explanation:
      "The way made between entering and leaving the water. A floating board is swung to and fro by the waves; that is not counted.",
    source: `${SMOOTHER} Distances on the WGS84 ellipsoid: Torge 2001, Geodesy, 4.1. The 8 s window: common practice, no source.`,
    limits:
      "Good to about 1 %. Holes in the recording up to 25 s are bridged, longer ones are left out. Where the walk ends and the paddling begins is uncertain by tens of seconds.",
  },
  {
    key: "elapsedS",
    name: "Elapsed",
    unit: "duration",
    formula: "end - start",
    explanation: "Clock time from the start of the session or stretch to its end, breaks included.",
    source: COMMON_PRACTICE,
    limits: "The ends are detected, and can be moved by hand.",
  },
  {
    key: "movingS",
    name: "Moving time",
    unit: "duration",
    formula: "time on the water with a speed of 0.5 m/s or more",
    explanation: "How long you were under way, paddling and waiting at rest taken apart.",
    source: COMMON_PRACTICE,
    limits: "Drifting with a current of more than 0.5 m/s counts as moving.",
  },
];

const FOIL: readonly FigureDefinition[] = [
  {
    key: "onFoilTimeS",
    name: "Time on foil",
    unit: "duration",
    formula: "sum over on-foil segments of end - start",
    explanation:
      "Time with the foil carrying you and the board clear of the water, found from the speed over the whole session at once, at a threshold that follows your own slowest riding.",
    source:
      "Viterbi 1967, IEEE Transactions on Information Theory 13(2): the most probable path of two states. Take-off and touchdown levels (1.14 and 1.02 times stall): trials on modelled sessions, no published source.",
    limits:
      "Take-offs are good to about 0.3 s, touchdowns to 0.5 s. Less than 3 s is not a segment; a touch under 2 s does not end one. The speed must jump as it does when a board comes free, so that boats and bicycles have no time on foil.",
  },
  {
    key: "onFoilDistanceM",
    name: "Distance on foil",
    unit: "distance",
    formula: "sum over on-foil segments of smoothed speed x time",
    explanation: "The way made on foil.",
    source: SMOOTHER,
    limits: "Good to about 0.3 %.",
  },
  {
    key: "onFoilShareOfDistance",
    name: "On-foil share of distance",
    unit: "share",
    formula: "distance on foil / distance on the water",
    explanation: "How much of your way you flew.",
    source: COMMON_PRACTICE,
    limits: "Paddling out and home counts against it; trim the ends to leave them out.",
  },
  {
    key: "onFoilShareOfTime",
    name: "On-foil share of time",
    unit: "share",
    formula: "time on foil / elapsed",
    explanation: "How much of the session you flew.",
    source: COMMON_PRACTICE,
    limits: "Waiting and breaks between runs count against it.",
  },
  {
    key: "takeoffs",
    name: "Take-offs",
    unit: "count",
    formula: "number of on-foil segments that begin in the stretch",
    explanation: "How often you got up.",
    source: COMMON_PRACTICE,
    limits: "Hops under 3 s are not counted.",
  },
  {
    key: "longestSegmentM",
    name: "Longest on-foil segment",
    unit: "distance",
    formula: "largest distance of one on-foil segment",
    explanation: "The farthest you flew without a touchdown.",
    source: COMMON_PRACTICE,
    limits: "A touch under 2 s does not end a segment.",
  },
];

const bestOverTime = (key: string, name: string, limits: string): FigureDefinition => ({
  key,
  name: `Best ${name}`,
  unit: "speed",
  formula: `largest value of (way after ${name} - way before) / ${name}`,
  explanation: `The fastest mean speed over ${name}, wherever in the session it begins.`,
  source: `${COMMON_PRACTICE} Excess of a maximum: David and Nagaraja 2003, Order Statistics, 3.1.`,
  limits,
});

const bestOverDistance = (key: string, name: string, limits: string): FigureDefinition => ({
  key,
  name: `Best ${name}`,
  unit: "speed",
  formula: `largest value of ${name} / time for it`,
  explanation: `The fastest mean speed over ${name} of way, wherever in the session it begins.`,
  source: COMMON_PRACTICE,
  limits,
});

const SHORT =
  "The fastest of many noisy windows tends to be too fast: 70 % of the expected excess is taken off. Never across a dropout.";
const LONG =
  "Never off the water, never across a gap in the recording; from 60 s and 500 m on, gaps of up to 15 s are passed over in a straight line.";

const BESTS: readonly FigureDefinition[] = [
  bestOverTime(
    "s2",
    "2 s",
    `1-3 % without receiver speed, about 1 % with it. Withheld below quality B. ${SHORT}`,
  ),
  bestOverTime("s10", "10 s", `About 1 %. ${SHORT}`),
  bestOverTime("s60", "60 s", LONG),
  bestOverTime("s600", "10 min", LONG),
  bestOverTime("s3600", "60 min", LONG),
  bestOverDistance("m100", "100 m", LONG),
  bestOverDistance("m250", "250 m", LONG),
  bestOverDistance("m500", "500 m", `About 0.4 %. ${LONG}`),
  bestOverDistance("m1000", "1000 m", LONG),
  bestOverDistance("nm", "nautical mile", `About 0.2 %. ${LONG}`),
  {
    key: "bestTensMeanMps",
    name: "Mean of the five best 10 s",
    unit: "speed",
    formula: "mean of the five fastest 10 s windows that do not overlap",
    explanation: "A top speed that one lucky gust or one bad fix does not make.",
    source: COMMON_PRACTICE,
    limits: "Needs five windows; their excess is not taken off.",
  },
];

const BUMPS: readonly FigureDefinition[] = [
  {
    key: "ridingSpeedMps",
    name: "Bump-riding speed",
    unit: "speed",
    formula: "sum of distance in bump rides / sum of time in bump rides",
    explanation:
      "Your speed while a bump carries you: from the middle of each rise of speed to the middle of the fall after it.",
    source: "Our definition. Turning points by a zig-zag with hysteresis: common practice, no source.",
    limits:
      "Only swings of speed of at least 0.5 m/s, and at least three standard errors, count as bumps (never more than 1 m/s). On a noisy recording small bumps are missed.",
  },
  {
    key: "ridesPerKm",
    name: "Bump rides per km",
    unit: "per_km",
    formula: "bump rides / distance on foil",
    explanation: "How often you caught a bump on the way.",
    source: COMMON_PRACTICE,
    limits: "Depends on the noise of the recording: compare sessions of one watch.",
  },
  {
    key: "ridesPerHour",
    name: "Bump rides per hour",
    unit: "per_hour",
    formula: "bump rides / time on foil",
    explanation: "How often you caught a bump by the clock.",
    source: COMMON_PRACTICE,
    limits: "As for bump rides per km.",
  },
  {
    key: "gainMpsMean",
    name: "Mean surge gain",
    unit: "speed",
    formula: "mean over bump rides of peak speed - speed in the lull before",
    explanation: "How much speed a bump gave you.",
    source: COMMON_PRACTICE,
    limits: "Smoothing rounds the tops: true gains are 0.1-0.2 m/s larger.",
  },
  {
    key: "intervalSMedian",
    name: "Time between bumps",
    unit: "duration",
    formula: "median time between neighbouring peaks of one on-foil segment",
    explanation: "The rhythm of your ride.",
    source: COMMON_PRACTICE,
    limits: "Missed small bumps make it longer.",
  },
  {
    key: "lullsKeptShare",
    name: "Lulls that kept the foil",
    unit: "share",
    formula: "lulls without a touchdown within 2 s / all lulls",
    explanation: "How often you carried through the slow part between two bumps.",
    source: COMMON_PRACTICE,
    limits: "A fall from full speed is not a lull.",
  },
];

const GLIDE: readonly FigureDefinition[] = [
  {
    key: "glide.ratio",
    name: "Glide ratio",
    unit: "ratio",
    formula: "sum of distance / sum of energy height lost over lulls, energy height = speed^2 / (2 g)",
    explanation:
      "How far the foil carries you for each metre of energy height it pays. On flat water without push it is the lift-to-drag ratio with your own air drag in it.",
    source:
      "Energy height: flight mechanics, common practice. Interval: percentile bootstrap over lulls, Efron and Tibshirani 1993, chapter 13.",
    limits:
      "Behind a bump or with wind it is an apparent value: the push makes it larger. One lull is good to 15-25 %, twenty to 4-8 %. Needs five lulls; speeds above 9 m/s are left out so that sessions compare.",
  },
];

/**
 * Every figure the analysis works out, in the order of the handbook, with its formula, source and limits.
 *
 * @example
 * FIGURE_DEFINITIONS.length > 20; // true
 */
export const FIGURE_DEFINITIONS: readonly FigureDefinition[] = [
  ...WAY,
  ...FOIL,
  ...BESTS,
  ...BUMPS,
  ...GLIDE,
];
