import { eq } from "drizzle-orm";
import { expect, test } from "vitest";
import { user } from "@/db/schema/user";
import { makeUser, openTestDatabase, testContext } from "@/tests/support/test-database";

test("two test databases never see each other's rows", async () => {
  const one = await openTestDatabase();
  const two = await openTestDatabase();
  const rider = await makeUser(one.db, { name: "Aske" });
  expect(await one.db.read.select().from(user).where(eq(user.id, rider.id))).toHaveLength(1);
  expect(await two.db.read.select().from(user)).toHaveLength(0);
  await one.close();
  await two.close();
});

test("a context without a user is anonymous", async () => {
  const { db, close } = await openTestDatabase();
  expect(testContext(db).actor).toEqual({ kind: "anonymous" });
  expect(testContext(db, { userId: "u1" }).actor).toMatchObject({ kind: "user", userId: "u1" });
  await close();
});
