import { DrizzleSQLiteAdapter } from "@lucia-auth/adapter-drizzle";
import { Lucia, TimeSpan, type Adapter } from "lucia";
import { authSession } from "@/db/schema/auth-session";
import { user } from "@/db/schema/user";
import { database } from "@/lib/server/context/database";

export const SESSION_COOKIE = "__Host-trimwake";
/** Unused for this long, a sign-in ends. */
export const IDLE_DAYS = 14;
/** Used or not, a sign-in ends after this. */
export const ABSOLUTE_DAYS = 90;

type AttributesOfSession = { absoluteEndMs: number; createdAtMs: number; device: string };

declare module "lucia" {
  interface Register {
    Lucia: ReturnType<typeof makeLucia>;
    DatabaseSessionAttributes: AttributesOfSession;
  }
}

/** Lucia's adapter with every write sent through the write queue: Lucia extends sign-ins during renders. */
function queuedAdapter(): Adapter {
  const on = (handle: unknown) =>
    new DrizzleSQLiteAdapter(
      handle as ConstructorParameters<typeof DrizzleSQLiteAdapter>[0],
      authSession as unknown as ConstructorParameters<typeof DrizzleSQLiteAdapter>[1],
      user as unknown as ConstructorParameters<typeof DrizzleSQLiteAdapter>[2],
    );
  const { raw, write } = database();
  const read = on(raw);
  return {
    getSessionAndUser: (id) => read.getSessionAndUser(id),
    getUserSessions: (id) => read.getUserSessions(id),
    setSession: (value) => write((tx) => on(tx).setSession(value)),
    updateSessionExpiration: (id, at) => write((tx) => on(tx).updateSessionExpiration(id, at)),
    deleteSession: (id) => write((tx) => on(tx).deleteSession(id)),
    deleteUserSessions: (id) => write((tx) => on(tx).deleteUserSessions(id)),
    deleteExpiredSessions: () => write((tx) => on(tx).deleteExpiredSessions()),
  };
}

function makeLucia() {
  return new Lucia<AttributesOfSession>(queuedAdapter(), {
    sessionExpiresIn: new TimeSpan(IDLE_DAYS, "d"),
    sessionCookie: {
      name: SESSION_COOKIE,
      attributes: { secure: true, sameSite: "lax", path: "/" },
    },
    getSessionAttributes: (attributes) => attributes,
  });
}

let instance: ReturnType<typeof makeLucia> | null = null;

/** The one Lucia instance of this process, made at first use. */
export function lucia(): ReturnType<typeof makeLucia> {
  instance ??= makeLucia();
  return instance;
}
