import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
import type { Reader, Transaction } from "@/db/client";
import { gearSpan } from "@/db/schema/gear-span";
import { part } from "@/db/schema/part";
import { session } from "@/db/schema/session";
import { setup } from "@/db/schema/setup";

export type PartRow = typeof part.$inferSelect;
export type SetupRow = typeof setup.$inferSelect;
export type GearSpanRow = typeof gearSpan.$inferSelect;

type Handle = Reader | Transaction;

/** All parts of an owner, retired ones last. */
export async function partsOf(db: Handle, ownerId: string): Promise<PartRow[]> {
  return db
    .select()
    .from(part)
    .where(eq(part.ownerId, ownerId))
    .orderBy(sql`${part.retiredAtMs} IS NOT NULL`, asc(part.kind), asc(part.maker), asc(part.model));
}

/** One part of an owner, or undefined. */
export async function partOf(db: Handle, ownerId: string, partId: string): Promise<PartRow | undefined> {
  return (
    await db
      .select()
      .from(part)
      .where(and(eq(part.id, partId), eq(part.ownerId, ownerId)))
      .limit(1)
  )[0];
}

/** All setups of an owner, retired ones last, newest first. */
export async function setupsOf(db: Handle, ownerId: string): Promise<SetupRow[]> {
  return db
    .select()
    .from(setup)
    .where(eq(setup.ownerId, ownerId))
    .orderBy(sql`${setup.retiredAtMs} IS NOT NULL`, desc(setup.id));
}

/** One setup of an owner, or undefined. */
export async function setupOf(db: Handle, ownerId: string, setupId: string): Promise<SetupRow | undefined> {
  return (
    await db
      .select()
      .from(setup)
      .where(and(eq(setup.id, setupId), eq(setup.ownerId, ownerId)))
      .limit(1)
  )[0];
}

/** The gear spans of one session of an owner, in order of time. */
export async function spansOf(db: Handle, ownerId: string, sessionId: string): Promise<GearSpanRow[]> {
  return db
    .select()
    .from(gearSpan)
    .where(and(eq(gearSpan.sessionId, sessionId), eq(gearSpan.ownerId, ownerId)))
    .orderBy(asc(gearSpan.startMs));
}

/** How often and how long each setup of an owner was ridden (spans of sessions that are not deleted). */
export async function setupUse(
  db: Handle,
  ownerId: string,
): Promise<{ setupId: string; spans: number; lastMs: number }[]> {
  return db
    .select({
      setupId: gearSpan.setupId,
      spans: sql<number>`count(*)`,
      lastMs: sql<number>`max(${gearSpan.endMs})`,
    })
    .from(gearSpan)
    .innerJoin(session, eq(session.id, gearSpan.sessionId))
    .where(and(eq(gearSpan.ownerId, ownerId), isNull(session.deletedAtMs)))
    .groupBy(gearSpan.setupId);
}

/** The setup of the span that ended last among the owner's sessions, skipping retired setups. */
export async function lastUsedSetupOf(db: Handle, ownerId: string): Promise<SetupRow | undefined> {
  const rows = await db
    .select({ setup })
    .from(gearSpan)
    .innerJoin(setup, eq(setup.id, gearSpan.setupId))
    .innerJoin(session, eq(session.id, gearSpan.sessionId))
    .where(and(eq(gearSpan.ownerId, ownerId), isNull(setup.retiredAtMs), isNull(session.deletedAtMs)))
    .orderBy(desc(gearSpan.endMs))
    .limit(1);
  return rows[0]?.setup;
}
