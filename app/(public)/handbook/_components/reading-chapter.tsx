import type { Chapter } from "./chapter";

export const readingChapter: Chapter = {
  slug: "reading",
  title: "How a track is read and cleaned",
  summary:
    "From the bytes of a file to a speed with an error, step by step, with everything dropped counted.",
  sections: [
    {
      id: "read",
      title: "Reading the file",
      body: (
        <>
          <p>
            What a file holds decides, not its name. All track segments with times become one list in order;
            the border between two segments is a gap in the recording. Waypoints and planned routes are left
            out with a word about it, and a file without timed points is refused, because no speed can be
            worked out from it.
          </p>
          <p>
            Kept for every fix when the file has it: height, heart rate, the receiver’s own speed, and what
            the receiver said of its accuracy. What is not known does no harm. The file itself is kept as it
            came: all figures can be worked out from it again.
          </p>
        </>
      ),
    },
    {
      id: "clean",
      title: "Cleaning, in this order",
      body: (
        <>
          <ol>
            <li>
              Impossible values go: places out of range or exactly 0, 0, and times before satellite navigation
              began (6 January 1980, IS-GPS-200).
            </li>
            <li>
              Fixes out of time order are put in order; fixes of one instant (within 20 ms) become one. A fix
              days away from all others has a wrong clock and goes.
            </li>
            <li>
              Frozen places go: a receiver under water repeats its last place and then jumps. Only the first
              of such a run stays, so that a gap is left instead of a rest and a leap.
            </li>
            <li>
              Spikes go: a fix, or a block of them, that leaves the course by more than a body can be
              accelerated and comes back just as suddenly. There is no single speed limit: a fast run is not a
              spike.
            </li>
            <li>A start that slides while the receiver settles is dropped.</li>
          </ol>
          <p>Each step counts what it dropped; the session page shows the counts in words.</p>
        </>
      ),
    },
    {
      id: "water",
      title: "The time on the water",
      body: (
        <>
          <p>
            Drives, walks and rests ashore at the ends are cut off: a drive by stretches faster than any foil
            from standing to standing, a rest by a net speed over half a minute no larger than a resting
            receiver shows, a walk by its steady pace. Walking and paddling out overlap in speed, so tens of
            seconds of doubt at the water’s edge cannot be avoided. You can move both ends of a session; the
            cut is remembered as your decision and nothing is lost.
          </p>
          <p>
            A recording in which nothing moves like a foil keeps everything but drives and rests, and shows no
            on-foil segments.
          </p>
        </>
      ),
    },
    {
      id: "smooth",
      title: "From places to speed",
      body: (
        <>
          <p>
            A fix is a few metres wrong, and its error wanders slowly. Adding up the steps between raw fixes
            makes a way too long: at ten fixes a second by far. So place and speed are estimated together by a
            smoother that knows how fast a foiler can change speed and how a receiver errs (a
            Rauch-Tung-Striebel type smoother, after Rauch, Tung and Striebel 1965, with the manoeuvre model
            of Singer 1970). The size of the receiver’s error is measured from the track itself. The
            receiver’s own speed helps when the file has it and it is believable.
          </p>
          <p>
            Every speed carries a standard error. About two times in three the true speed lies within one of
            them. The band around the line of the timeline is this error.
          </p>
        </>
      ),
    },
    {
      id: "gaps",
      title: "Gaps",
      body: (
        <p>
          A hole longer than 5 s, or four times the usual step, is a gap. Gaps stay gaps: no best runs through
          one. A short dropout (water over the antenna, up to 25 s) is bridged for the distance under way.
        </p>
      ),
    },
    {
      id: "earth",
      title: "Distance on the earth",
      body: (
        <p>
          Distances are worked out on the WGS84 ellipsoid: steps under one kilometre by the radii of curvature
          at their middle latitude, longer ones as geodesics (Karney 2013). A sphere would be up to half a per
          cent wrong, which is 0.1 kn at 20 kn.
        </p>
      ),
    },
  ],
};
