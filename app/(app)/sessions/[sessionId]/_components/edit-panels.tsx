import { Section } from "@/components/ui/section";
import { distanceM } from "@/lib/geo/distance-m";
import { requestContext } from "@/lib/server/adapter/request-context";
import type { CurrentUser } from "@/lib/server/auth/current-user";
import type { listGearSpans, SetupWithUse } from "@/lib/server/gear/read-gear";
import { listPlaces } from "@/lib/server/places/list-places";
import type { SessionDetail } from "@/lib/server/sessions/get-session";
import { endsOf, placeNear } from "@/lib/server/sessions/session-title";
import {
  saveDetailsAction,
  saveGearAction,
  savePlacesAction,
  saveTrimAction,
} from "@/app/(app)/sessions/[sessionId]/actions";
import { detailValues, gearValues, trimValues } from "@/app/(app)/sessions/[sessionId]/session-values";
import { DetailsForm } from "./details-form";
import { GearForm } from "./gear-form";
import { PlacesForm } from "./places-form";
import { TrimForm } from "./trim-form";

type Spans = Awaited<ReturnType<typeof listGearSpans>>;

/** Nearer than this, both ends take one name; the same reach as a place that is named again. */
const ONE_PLACE_M = 400;

/** Setups to choose from: those in use, and retired ones that the session carries already. */
function setupOptions(setups: readonly SetupWithUse[], spans: Spans) {
  const ridden = new Set(spans.map((span) => span.setupId));
  return setups
    .filter((setup) => setup.retiredAtMs === null || ridden.has(setup.id))
    .map((setup) => ({
      value: setup.id,
      label: setup.retiredAtMs === null ? setup.name : `${setup.name} (retired)`,
    }));
}

/** Everything the rider can say about a session, each in its own fold. */
export async function EditPanels(props: {
  session: SessionDetail;
  spans: Spans;
  setups: readonly SetupWithUse[];
  units: CurrentUser["units"];
}) {
  const { session, spans, setups, units } = props;
  const { id: sessionId, timeZone } = session;
  const ends = endsOf(session);
  const places = ends === null ? [] : await listPlaces(await requestContext());
  return (
    <Section id="edit" title="Edit" reading="What only you can say about it." className="no-print">
      <div className="rule-ink">
        <DetailsForm
          act={saveDetailsAction}
          sessionId={sessionId}
          initial={detailValues(session, units.speed)}
          speedUnit={units.speed}
        />
        <GearForm
          act={saveGearAction}
          sessionId={sessionId}
          initial={gearValues(session, spans)}
          setups={setupOptions(setups, spans)}
          timeZone={timeZone}
        />
        {ends !== null && (
          <PlacesForm
            act={savePlacesAction}
            sessionId={sessionId}
            initial={{
              startName: placeNear(places, ends.from)?.name ?? "",
              endName: placeNear(places, ends.to)?.name ?? "",
            }}
            onePlace={
              distanceM(ends.from.latDeg, ends.from.lonDeg, ends.to.latDeg, ends.to.lonDeg) <= ONE_PLACE_M
            }
          />
        )}
        <TrimForm
          act={saveTrimAction}
          sessionId={sessionId}
          initial={trimValues(session)}
          timeZone={timeZone}
          isTrimmed={session.trimStartMs !== null}
        />
      </div>
    </Section>
  );
}
