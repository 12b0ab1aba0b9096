/** One figure as the handbook explains it. */
export type FigureDefinition = {
  readonly key: string;
  readonly name: string;
  readonly formula: string;
  readonly explanation: string;
  readonly source: string;
  readonly limits: string;
  readonly unit: string;
};

/**
 * What every figure of a session is, in the order the handbook prints them. `unit` is the kind of unit in words
 * (the person chooses which), empty for a plain number; sources are publications or say that it is common practice.
 *
 * @example
 * figureDefinitions.find((figure) => figure.key === "glide-ratio")?.name; // "Glide ratio"
 */
export const figureDefinitions: readonly FigureDefinition[] = [
  {
    key: "bump-riding-speed",
    name: "Bump-riding speed",
    formula: "sum of distance in bump rides / sum of time in bump rides",
    explanation:
      "How fast you are while a bump carries you. A bump ride is the stretch around a peak of speed, above the middle between the peak and its neighbouring lulls.",
    source: "Our own definition. Turning points by a zig-zag with hysteresis: common practice, no source.",
    limits:
      "Only on foil, and only where the speed swings by 0.5 m/s or more and by more than its error; on a poor recording small bumps are missed.",
    unit: "speed",
  },
  {
    key: "bump-rides",
    name: "Bump rides",
    formula:
      "count of surges whose swing is at least max(0.5 m/s, 3 standard errors of a difference), at most 1 m/s",
    explanation:
      "How many bumps carried you, also per kilometre and per hour on foil. The gain of a surge is the speed at its peak less the speed in the lull before it; the interval is the median time between neighbouring peaks.",
    source: "Our own definition; the swing is from trials, no published source.",
    limits: "A peak that a touchdown cuts off is left out.",
    unit: "",
  },
  {
    key: "lulls-kept",
    name: "Lulls that kept the foil",
    formula: "lulls without a touchdown within 2 s of their lowest speed / all lulls",
    explanation: "How often you came through the slow stretch between two bumps without touching down.",
    source: "Our own definition.",
    limits: "A touchdown shorter than 2 s does not count as one.",
    unit: "per cent",
  },
  {
    key: "glide-ratio",
    name: "Glide ratio",
    formula: "sum of d / sum of dh over lulls, with energy height h = v² / (2 g), g = 9.80665 m/s²",
    explanation:
      "Metres travelled for each metre of energy height lost. Between bumps the foil pays for its way with speed; the longer the way for the speed lost, the less drag. Pooled over all lulls of the session.",
    source:
      "Energy height: Lush 1940, as in texts of flight mechanics. Interval (95 %): bootstrap over lulls, Efron and Tibshirani 1993, chapter 13. Standard gravity: 3rd CGPM 1901.",
    limits:
      "On flat water with no push this is the ratio of lift to drag, the rider’s air drag included. Behind a bump or with wind it is an apparent value. A single lull is good to 15 to 25 per cent, twenty to 4 to 8 per cent at one fix a second; below five lulls nothing is shown. Speeds above 9 m/s are left out, because the ratio falls with speed and sessions should be compared over speeds they share.",
    unit: "",
  },
  {
    key: "on-foil-share",
    name: "On-foil share",
    formula: "on-foil distance / distance under way; on-foil time / time on the water",
    explanation:
      "How much of the way, and how much of the time, the board was flying. On foil and off foil are told apart over the whole track at once, by a path through two states, so that a single slow second is no touchdown.",
    source:
      "Most probable path: Viterbi 1967. The threshold follows the slow riding of the session, 2.8 to 4.6 m/s or from the setup’s lowest flying speed: trials, no published source.",
    limits:
      "At least 3 s on foil make a segment; breaks under 2 s do not end one. A slow, steady tow or a fast displacement run can be taken for foiling.",
    unit: "per cent",
  },
  {
    key: "on-foil-segments",
    name: "On-foil segments",
    formula:
      "from take-off (smoothed speed crosses the threshold) to touchdown (onset of braking, or the crossing down)",
    explanation:
      "Stretches without a touchdown, with their length, time, mean and highest speed, bearing made good and how sure the program is. The longest is given by distance and by time.",
    source: "Our own definition; edges from trials on tracks with known truth.",
    limits: "Take-offs are good to about 0.3 s at one fix a second on a clean track.",
    unit: "distance, time",
  },
  {
    key: "distance-under-way",
    name: "Distance under way",
    formula: "integral of smoothed speed over the time on the water",
    explanation:
      "The way through the water’s surface over ground. It is the way of the smoothed track and not the sum of steps between raw fixes, which counts the receiver’s wandering as way.",
    source:
      "Smoother: Rauch, Tung and Striebel 1965; manoeuvre model: Singer 1970. Distances on the WGS84 ellipsoid: Karney 2013.",
    limits:
      "Its standard error is about 0.4 per cent of the way on our made tracks; current moves you without showing.",
    unit: "distance",
  },
  {
    key: "elapsed-moving",
    name: "Elapsed and moving time",
    formula: "elapsed = end - start of the time on the water; moving = time at 0.5 m/s or more outside gaps",
    explanation: "How long you were out, and how long of that you were under way.",
    source: "Common practice, no source.",
    limits: "Gaps count as elapsed and not as moving.",
    unit: "h:mm:ss",
  },
  {
    key: "best-time",
    name: "Bests over a time",
    formula:
      "max over all windows of T seconds of (way at the end - way at the start) / T; T = 2, 10, 60, 600, 3600",
    explanation:
      "The fastest mean speed over two seconds, ten seconds, a minute, ten minutes, an hour. The window’s ends fall between fixes where that is faster. The mean of the five best tens that do not overlap stands beside them.",
    source: "Common practice, no source. Excess of a maximum: order statistics of normal variables.",
    limits:
      "The maximum of a noisy speed is biased upward: up to ten seconds the expected excess is taken off where it is larger than the standard error. No window runs through a gap or leaves the water. Below quality B the two-second best is withheld.",
    unit: "speed",
  },
  {
    key: "best-distance",
    name: "Bests over a distance",
    formula: "max over all stretches of length L of L / time; L = 100, 250, 500, 1000 and 1852 m",
    explanation:
      "The fastest mean speed over a hundred metres up to one nautical mile, along the smoothed way.",
    source: "Common practice, no source. Nautical mile: SI Brochure, 9th edition.",
    limits:
      "The way is the ridden one, not the straight line. The longer the stretch, the smaller the error.",
    unit: "speed",
  },
];
