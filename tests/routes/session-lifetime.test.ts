import { eq } from "drizzle-orm";
import { beforeAll, expect, test, vi } from "vitest";
import { db } from "@/db/client";
import { sessions } from "@/db/schema";
import { auth } from "@/lib/auth/auth";
import { sessionCookieName } from "@/lib/auth/session-cookie";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const TOKEN = "a-session-that-began-long-ago";
vi.mock("next/headers", () => ({
  headers: () =>
    Promise.resolve(new Headers({ cookie: `authjs.session-token=${TOKEN}`, "user-agent": "test" })),
  cookies: () => Promise.resolve({ get: () => undefined, set: () => undefined }),
}));

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});

test("a session ends when it was to end, however often it is used", async () => {
  expect(sessionCookieName()).toBe("authjs.session-token");
  // Begun 28 days ago: two are left of its thirty.
  const expires = new Date(Date.now() + 2 * 86_400_000);
  expires.setMilliseconds(0);
  await db
    .insert(sessions)
    .values({ sessionToken: TOKEN, userId: world.people.actor.userId, expires });
  expect((await auth())?.user?.id).toBe(world.people.actor.userId);
  const [row] = await db
    .select({ expires: sessions.expires })
    .from(sessions)
    .where(eq(sessions.sessionToken, TOKEN));
  expect(row?.expires).toEqual(expires);
});
