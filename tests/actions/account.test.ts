import { and, eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import {
  changeName,
  createToken,
  endOtherSessions,
  endSession,
  removePassword,
  revokeToken,
  setPassword,
} from "@/app/(me)/account/actions";
import { signOut } from "@/app/_frame/actions";
import { db } from "@/db/client";
import { apiTokens, outbox, passwordHashes, rateCounters, sessions, users } from "@/db/schema";
import { hashPassword, verifyPassword } from "@/lib/auth/password";
import { sessionCookieName } from "@/lib/auth/session-cookie";
import { asksForPassword, readAccount } from "@/lib/data/account";
import { listSessions } from "@/lib/data/sessions";
import { listTokens, userOfToken } from "@/lib/data/tokens";
import { actorOf } from "../helpers/actor-of";
import { as, cookieJar } from "../helpers/as";
import { redirectOf } from "../helpers/redirect-of";
import { makeWorld } from "../helpers/world";
import type { TestPerson, World } from "../helpers/world";

const OLD = "four brass lanterns";
const NEW = "seven paper herons";
const HOUR = 3_600_000;

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});
beforeEach(async () => {
  await Promise.all([
    db.delete(sessions),
    db.delete(passwordHashes),
    db.delete(rateCounters),
    db.delete(outbox),
  ]);
});

let made = 0;
async function session(
  person: TestPerson,
  options: { device?: string; ageMs?: number } = {},
): Promise<string> {
  made += 1;
  const sessionToken = `session-${String(made)}`;
  await db.insert(sessions).values({
    sessionToken,
    userId: person.userId,
    expires: new Date(Date.now() + 86_400_000),
    device: options.device ?? "Firefox on Android",
    createdAt: new Date(Date.now() - (options.ageMs ?? 0)),
  });
  return sessionToken;
}

/** From here on this person asks, from this session. */
function asIn(person: TestPerson, token: string): void {
  as(person.userId);
  cookieJar().set(sessionCookieName(), token);
}

const hashOf = async (person: TestPerson): Promise<string | undefined> =>
  (
    await db
      .select({ hash: passwordHashes.hash })
      .from(passwordHashes)
      .where(eq(passwordHashes.userId, person.userId))
  )[0]?.hash;
const tokensOf = async (person: TestPerson): Promise<string[]> =>
  (
    await db
      .select({ token: sessions.sessionToken })
      .from(sessions)
      .where(eq(sessions.userId, person.userId))
  ).map((row) => row.token);
const changedMails = (person: TestPerson) =>
  db.$count(outbox, and(eq(outbox.toEmail, person.email), eq(outbox.template, "password-changed")));

describe("the name", () => {
  test("is changed for oneself only, and nobody changes one without signing in", async () => {
    const { actor, md } = world.people;
    as(actor.userId);
    expect(await changeName({ name: "  Wren T. Tallis " })).toMatchObject({ ok: true });
    expect(await changeName({ name: " " })).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { name: expect.any(String) } },
    });
    as(null);
    expect(await changeName({ name: "Nobody" })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
    const names = await db.select({ id: users.id, name: users.name }).from(users);
    expect(names.find((row) => row.id === actor.userId)?.name).toBe("Wren T. Tallis");
    expect(names.find((row) => row.id === md.userId)?.name).toBe(md.name);
  });
});

describe("setting a password", () => {
  test("for the first time: it is kept as a hash, other sessions end, this one stays, and a mail says so", async () => {
    const { actor, md } = world.people;
    const here = await session(actor, { ageMs: 5 * HOUR });
    await session(actor);
    const others = await session(md);
    asIn(actor, here);
    expect(await setPassword({ current: "", password: NEW })).toMatchObject({ ok: true });
    expect(await verifyPassword(NEW, (await hashOf(actor)) ?? "")).toBe(true);
    expect(await tokensOf(actor)).toEqual([here]);
    expect(await tokensOf(md)).toEqual([others]);
    expect(await changedMails(actor)).toBe(1);
  });

  test("a change from a session older than an hour needs the present password", async () => {
    const { actor } = world.people;
    await db.insert(passwordHashes).values({ userId: actor.userId, hash: await hashPassword(OLD) });
    const here = await session(actor, { ageMs: 2 * HOUR });
    asIn(actor, here);
    expect(await asksForPassword(await actorOf(actor.userId), here)).toBe(true);
    for (const current of ["", "four brass lantern"]) {
      expect(await setPassword({ current, password: NEW })).toMatchObject({
        ok: false,
        error: {
          code: "invalid",
          fields: { current: expect.stringMatching(/password you have now/) },
        },
      });
    }
    expect(await verifyPassword(OLD, (await hashOf(actor)) ?? "")).toBe(true);
    expect(await changedMails(actor)).toBe(0);
    expect(await setPassword({ current: OLD, password: NEW })).toMatchObject({ ok: true });
    expect(await verifyPassword(NEW, (await hashOf(actor)) ?? "")).toBe(true);
  });

  test("a change within the hour of signing in needs none, so that a forgotten one can be replaced", async () => {
    const { actor } = world.people;
    await db.insert(passwordHashes).values({ userId: actor.userId, hash: await hashPassword(OLD) });
    const here = await session(actor);
    asIn(actor, here);
    expect(await asksForPassword(await actorOf(actor.userId), here)).toBe(false);
    expect(await setPassword({ current: "", password: NEW })).toMatchObject({ ok: true });
  });

  test("another person's fresh session is no proof", async () => {
    const { actor, md } = world.people;
    await db.insert(passwordHashes).values({ userId: actor.userId, hash: await hashPassword(OLD) });
    asIn(actor, await session(md));
    expect(await setPassword({ current: "", password: NEW })).toMatchObject({
      ok: false,
      error: { code: "invalid" },
    });
  });

  test("the present password cannot be guessed at without end", async () => {
    const { actor } = world.people;
    await db.insert(passwordHashes).values({ userId: actor.userId, hash: await hashPassword(OLD) });
    asIn(actor, await session(actor, { ageMs: 2 * HOUR }));
    for (let i = 0; i < 8; i += 1) await setPassword({ current: "", password: NEW });
    expect(await setPassword({ current: OLD, password: NEW })).toMatchObject({
      ok: false,
      error: { code: "too-many" },
    });
  });

  test.each(["eleven char", "WrenTallis2026", "password1234", "aaaaaaaaaaaaaa", "x".repeat(201)])(
    "%s is refused beside its field, and nothing changes",
    async (password) => {
      const { actor } = world.people;
      await db.update(users).set({ name: actor.name }).where(eq(users.id, actor.userId));
      const [here, there] = [await session(actor), await session(actor)];
      asIn(actor, here);
      expect(await setPassword({ current: "", password })).toMatchObject({
        ok: false,
        error: { code: "invalid", fields: { password: expect.any(String) } },
      });
      expect(await hashOf(actor)).toBeUndefined();
      expect((await tokensOf(actor)).toSorted()).toEqual([here, there].toSorted());
    },
  );

  test("removing it ends other sessions and says so by mail; there is none to remove twice", async () => {
    const { actor } = world.people;
    await db.insert(passwordHashes).values({ userId: actor.userId, hash: await hashPassword(OLD) });
    const here = await session(actor);
    await session(actor);
    asIn(actor, here);
    expect(await removePassword({ current: "" })).toMatchObject({ ok: true });
    expect(await hashOf(actor)).toBeUndefined();
    expect(await tokensOf(actor)).toEqual([here]);
    expect(await changedMails(actor)).toBe(1);
    expect(await removePassword({ current: "" })).toMatchObject({
      ok: false,
      error: { code: "refused" },
    });
    as(null);
    expect(await removePassword({ current: "" })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
  });
});

describe("sessions", () => {
  test("the list names the devices, marks this one, leaves out what is over, and holds no secret", async () => {
    const { actor, md } = world.people;
    const here = await session(actor, { device: "Firefox on Android" });
    await session(actor, { device: "Chrome on Linux", ageMs: HOUR });
    await session(md);
    const over = await session(actor);
    await db
      .update(sessions)
      .set({ expires: new Date(Date.now() - 1000) })
      .where(eq(sessions.sessionToken, over));
    const listed = await listSessions(await actorOf(actor.userId), here);
    expect(listed.map((row) => [row.device, row.current])).toEqual([
      ["Firefox on Android", true],
      ["Chrome on Linux", false],
    ]);
    expect(JSON.stringify(listed)).not.toContain("session-");
  });

  test("one is ended; somebody else's is not there to end", async () => {
    const { actor, md } = world.people;
    const here = await session(actor);
    const there = await session(actor);
    const theirs = await session(md);
    const own =
      (await listSessions(await actorOf(actor.userId), here)).find((row) => !row.current)?.id ?? "";
    const foreign = (await listSessions(await actorOf(md.userId), null))[0]?.id ?? "";
    asIn(actor, here);
    expect(await endSession({ sessionId: foreign })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await tokensOf(md)).toEqual([theirs]);
    expect(await endSession({ sessionId: own })).toMatchObject({ ok: true });
    expect(await tokensOf(actor)).toEqual([here]);
    expect(await tokensOf(actor)).not.toContain(there);
    expect(await endSession({ sessionId: own })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await endSession({ sessionId: here })).toMatchObject({
      ok: false,
      error: { code: "invalid" },
    });
    as(null);
    expect(await endSession({ sessionId: own })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
  });

  test("all others are ended, and nobody else's", async () => {
    const { actor, md } = world.people;
    const here = await session(actor);
    await session(actor);
    await session(actor);
    const theirs = await session(md);
    asIn(actor, here);
    expect(await endOtherSessions({})).toMatchObject({ ok: true });
    expect(await tokensOf(actor)).toEqual([here]);
    expect(await tokensOf(md)).toEqual([theirs]);
  });

  test("signing out ends this session and no other", async () => {
    const { actor } = world.people;
    const here = await session(actor);
    const there = await session(actor);
    asIn(actor, here);
    expect(await redirectOf(signOut())).toBe("/");
    expect(await tokensOf(actor)).toEqual([there]);
    expect(cookieJar().get(sessionCookieName())).toBe("");
  });
});

describe("tokens for programs", () => {
  test("a token is shown once, speaks for its owner, and is kept as a hash", async () => {
    const { actor } = world.people;
    as(actor.userId);
    const result = await createToken({ label: " My spreadsheet " });
    if (!result.ok) throw new Error(result.error.message);
    expect(await userOfToken(result.data.token)).toBe(actor.userId);
    const [row] = await db.select().from(apiTokens).where(eq(apiTokens.userId, actor.userId));
    expect(row?.label).toBe("My spreadsheet");
    expect(JSON.stringify(row)).not.toContain(result.data.token);
    expect(await createToken({ label: "" })).toMatchObject({
      ok: false,
      error: { code: "invalid" },
    });
  });

  test("its owner revokes it; nobody else can; then it speaks for nobody", async () => {
    const { md, actor } = world.people;
    as(md.userId);
    const result = await createToken({ label: "Calls" });
    if (!result.ok) throw new Error(result.error.message);
    const tokenId = (await listTokens(await actorOf(md.userId)))[0]?.id ?? "";
    as(actor.userId);
    expect(await revokeToken({ tokenId })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await userOfToken(result.data.token)).toBe(md.userId);
    as(md.userId);
    expect(await revokeToken({ tokenId })).toMatchObject({ ok: true });
    expect(await userOfToken(result.data.token)).toBeNull();
    expect(await listTokens(await actorOf(md.userId))).toEqual([]);
    as(null);
    expect(await createToken({ label: "x" })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
    expect(await revokeToken({ tokenId })).toMatchObject({
      ok: false,
      error: { code: "signed-out" },
    });
  });
});

test("the account page tells what each company has written down, and nothing of anyone else", async () => {
  const { stageManager } = world.people;
  const account = await readAccount(await actorOf(stageManager.userId));
  expect(account).toEqual({
    name: "Bram Teller",
    email: stageManager.email,
    passwordSetAt: null,
    records: [
      {
        company: "Lantern Street Theatre",
        name: "Bram Teller",
        email: stageManager.email,
        phone: null,
        pronouns: null,
        positions: ["Stage manager, The Tidewatcher"],
      },
    ],
  });
  expect((await readAccount(await actorOf(world.strangerId))).records).toEqual([]);
});
