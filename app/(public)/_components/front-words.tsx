import Link from "next/link";
import { CAUTIONS } from "@/components/shell/cautions";
import { Section } from "@/components/ui/section";

const STEPS = [
  {
    name: "Read the track",
    text: "Drop the files of a watch: GPX, TCX, KML or FIT, or a zip of them. The drive to the beach is cut off, bad fixes are dropped and counted, gaps stay gaps, and every track gets a quality grade with its reason.",
  },
  {
    name: "See what happened",
    text: "When the board was on foil, how far and how fast, bump by bump; how well it glided between them; the best runs over ten seconds, 500 metres, a nautical mile, each with its error.",
  },
  {
    name: "Say what was ridden",
    text: "Front wing, rear wing, fuselage, mast position, shim: parts make setups, one setup is copied and one thing changed, and gear can change in the middle of a session.",
  },
  {
    name: "Compare fairly",
    text: "Sessions by front wing, setup, spot and wind; which setup ran fastest, with the spread and the hours behind it, and in plain words what such a comparison cannot say.",
  },
] as const;

export function FrontSteps() {
  return (
    <Section id="job" title="From the beach to the answer" reading="Four things, in this order.">
      <ol className="rule-ink">
        {STEPS.map((step, i) => (
          <li
            key={step.name}
            className="rule-hair grid gap-x-6 gap-y-1 py-4 sm:grid-cols-[2rem_14rem_minmax(0,1fr)] sm:items-baseline"
          >
            <span className="num text-muted hidden sm:block" aria-hidden="true">
              {i + 1}
            </span>
            <h3 className="text-base">{step.name}</h3>
            <p className="max-w-prose">{step.text}</p>
          </li>
        ))}
      </ol>
    </Section>
  );
}

export function FrontCautions() {
  return (
    <Section id="before" title="Before you go out">
      <div className="rule-ink grid gap-x-12 gap-y-4 py-4 md:grid-cols-2">
        <p className="max-w-prose">{CAUTIONS.water}</p>
        <div className="max-w-prose">
          <p>{CAUTIONS.trim}</p>
          <p className="mt-3">
            Your tracks are yours alone: no other account sees them.{" "}
            <Link href="/handbook/privacy" className="link">
              What is kept, and for how long
            </Link>
          </p>
        </div>
      </div>
    </Section>
  );
}
