import { analyse } from "@/lib/analysis/analyse";
import { RECEIVERS } from "@/tests/support/sea/receivers";
import { makeSession, type SessionKind } from "@/tests/support/sea/sessions";

import { type Score, scoreSession } from "./score-session";

export type Scored = {
  readonly kind: SessionKind;
  readonly receiver: string;
  readonly seed: number;
  readonly score: Score;
};

/** Which sessions to ride, and by which receivers (names; all when not said) to record them. */
export type CorpusOptions = {
  readonly rides: readonly { readonly kind: SessionKind; readonly seed: number }[];
  readonly receivers?: readonly string[];
  readonly minutes?: number;
};

/** Rides, records, analyses and scores: every ride by every receiver. */
export function scoreCorpus(options: CorpusOptions): Scored[] {
  const receivers = RECEIVERS.filter((r) => options.receivers?.includes(r.name) ?? true);
  return options.rides.flatMap(({ kind, seed }) => {
    const session = makeSession(kind, seed, options.minutes);
    return receivers.map((receiver) => {
      const { fixes, dropouts } = session.recordBy(receiver);
      const analysis = analyse(fixes, {
        discipline: session.discipline,
        trim: null,
        minimumFlyingSpeedMps: null,
      });
      const scores = { turns: kind === "wing", wind: kind !== "coastdown", longBests: kind !== "coastdown" };
      return {
        kind,
        receiver: receiver.name,
        seed,
        score: scoreSession({ analysis, truth: session.truth, dropouts, scores }),
      };
    });
  });
}
