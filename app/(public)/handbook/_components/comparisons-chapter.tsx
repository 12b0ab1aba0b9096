import type { Chapter } from "./chapter";

export const comparisonsChapter: Chapter = {
  slug: "comparisons",
  title: "What a comparison cannot say",
  summary: "Why the faster number is not always the faster setup, and how to plan so that it is.",
  sections: [
    {
      id: "counted",
      title: "What is counted",
      body: (
        <p>
          For every setup, or for every front wing, rear wing, mast position or shim: the number of sessions,
          the time on foil, and the median with the spread of bump-riding speed, best 500 m, glide ratio and
          on-foil share. The median is the middle session; the middle half of the sessions lies within the
          thick bar, and the thin line runs from the least to the most.
        </p>
      ),
    },
    {
      id: "not",
      title: "What it leaves out",
      body: (
        <>
          <p>These medians are of the days as they came. They do not take out:</p>
          <ul>
            <li>the day: the setup that was always ridden on windy days looks fast;</li>
            <li>the rider: a stronger or lighter rider, or the same rider a season later;</li>
            <li>the route, the current and the sea: a run with the stream gains what the water gives;</li>
            <li>what else was changed: two setups may differ in more than the part you look at;</li>
            <li>the choice: riders take out the large wing when they expect little.</li>
          </ul>
          <p>
            In trials on simulated seasons, raw medians picked the truly fastest setup less often than any
            method that takes out rider and day. Two overlapping bars say nothing; two bars apart say
            something only when both were ridden on several, and better the same, days.
          </p>
        </>
      ),
    },
    {
      id: "plan",
      title: "How to make it say more",
      body: (
        <ul>
          <li>Change one thing at a time and write it down on the day.</li>
          <li>
            Ride both on the same day, by the same rider, on the same stretch: A, B, B, A, so that a rising
            wind falls on both alike. Eight runs settle what four cannot.
          </li>
          <li>Keep spans on foil long: five minutes or more of each.</li>
          <li>Enter the wind. A day with its wind is worth more than one without.</li>
        </ul>
      ),
    },
    {
      id: "error",
      title: "Errors of the figures themselves",
      body: (
        <p>
          At one fix a second, a best over ten seconds is good to about one per cent, one over 500 m to about
          half a per cent, a glide ratio from twenty lulls to four to eight per cent (medians in our trials on
          made tracks with known truth). A difference smaller than that is not a difference.
        </p>
      ),
    },
  ],
};
