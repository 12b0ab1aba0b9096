import { DrizzleSQLiteAdapter } from "@lucia-auth/adapter-drizzle";
import { Lucia, TimeSpan, type Adapter } from "lucia";
import type { Database } from "@/db/client";
import { authSession } from "@/db/schema/auth-session";
import { user } from "@/db/schema/user";
import { SESSION_COOKIE } from "./session-cookie-name";

/** Unused for this long, a sign-in ends. */
export const IDLE_DAYS = 14;
/** Used or not, a sign-in ends after this. */
export const ABSOLUTE_DAYS = 90;

type AttributesOfSession = { absoluteEndMs: number; createdAtMs: number; device: string };

declare module "lucia" {
  interface Register {
    Lucia: Lucia<AttributesOfSession>;
    DatabaseSessionAttributes: AttributesOfSession;
  }
}

/** Lucia's adapter on a handle: the database for reading, a transaction for writing. */
export function adapterOn(handle: unknown): Adapter {
  return new DrizzleSQLiteAdapter(
    handle as ConstructorParameters<typeof DrizzleSQLiteAdapter>[0],
    authSession as unknown as ConstructorParameters<typeof DrizzleSQLiteAdapter>[1],
    user as unknown as ConstructorParameters<typeof DrizzleSQLiteAdapter>[2],
  );
}

/** Lucia's adapter with every write sent through the write queue: Lucia extends sign-ins during renders. */
function queuedAdapter({ raw, write }: Database): Adapter {
  const read = adapterOn(raw);
  return {
    getSessionAndUser: (id) => read.getSessionAndUser(id),
    getUserSessions: (id) => read.getUserSessions(id),
    setSession: (value) => write((tx) => adapterOn(tx).setSession(value)),
    updateSessionExpiration: (id, at) => write((tx) => adapterOn(tx).updateSessionExpiration(id, at)),
    deleteSession: (id) => write((tx) => adapterOn(tx).deleteSession(id)),
    deleteUserSessions: (id) => write((tx) => adapterOn(tx).deleteUserSessions(id)),
    deleteExpiredSessions: () => write((tx) => adapterOn(tx).deleteExpiredSessions()),
  };
}

function makeLucia(db: Database): Lucia<AttributesOfSession> {
  return new Lucia<AttributesOfSession>(queuedAdapter(db), {
    sessionExpiresIn: new TimeSpan(IDLE_DAYS, "d"),
    sessionCookie: {
      name: SESSION_COOKIE,
      attributes: { secure: true, sameSite: "lax", path: "/" },
    },
    getSessionAttributes: (attributes) => attributes,
  });
}

const instances = new WeakMap<Database, Lucia<AttributesOfSession>>();

/** The one Lucia instance of a database, made at first use. */
export function lucia(db: Database): Lucia<AttributesOfSession> {
  const found = instances.get(db) ?? makeLucia(db);
  instances.set(db, found);
  return found;
}
