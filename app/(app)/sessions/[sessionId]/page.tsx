import type { Metadata } from "next";
import { SessionSheet } from "@/components/session/session-sheet";
import { LinkButton } from "@/components/ui/link-button";
import { PageHeader } from "@/components/ui/page-header";
import { pageRead } from "@/lib/server/adapter/page";
import { requestContext } from "@/lib/server/adapter/request-context";
import { requireUser } from "@/lib/server/auth/current-user";
import { listGearSpans, listSetups } from "@/lib/server/gear/read-gear";
import { listPlaces } from "@/lib/server/places/list-places";
import { getSession } from "@/lib/server/sessions/get-session";
import { DeleteSession } from "./_components/delete-session";
import { DeletedNotice } from "./_components/deleted-notice";
import { EditPanels } from "./_components/edit-panels";
import { sessionData, sessionSentence } from "./_components/session-data-of";

type Props = PageProps<"/sessions/[sessionId]">;

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const { sessionId } = await params;
  const ctx = await requestContext();
  const session = await pageRead(`/sessions/${sessionId}`, () => getSession(ctx, sessionId));
  return { title: session.title };
}

export default async function SessionPage({ params }: Props) {
  const { sessionId } = await params;
  const path = `/sessions/${sessionId}`;
  const user = await requireUser(path);
  const ctx = await requestContext();
  const [session, spans, setups, places] = await pageRead(path, () =>
    Promise.all([
      getSession(ctx, sessionId),
      listGearSpans(ctx, sessionId),
      listSetups(ctx),
      listPlaces(ctx),
    ]),
  );
  if (session.deletedAtMs !== null) return <DeletedNotice session={session} />;
  const actions = (
    <>
      <LinkButton href="#edit">Edit</LinkButton>
      <LinkButton href={`/api/sessions/${session.id}/raw`} prefetch={false}>
        Raw file
      </LinkButton>
      <DeleteSession sessionId={session.id} />
    </>
  );
  return (
    <>
      <PageHeader title={session.title} subtitle={sessionSentence(session, user.units)} actions={actions} />
      {session.notes !== "" && <p className="prose mt-4 whitespace-pre-line">{session.notes}</p>}
      <SessionSheet data={sessionData(session, { spans, setups, places, units: user.units })} />
      <EditPanels session={session} spans={spans} setups={setups} units={user.units} />
    </>
  );
}
