import { eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { acceptInvitation } from "@/app/(public)/actions";
import { joinCompany } from "@/app/(me)/actions";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import { invitations, people, positions, sessions, users } from "@/db/schema";
import { hashToken, newSecret } from "@/lib/auth/hash-token";
import { sessionCookieName } from "@/lib/auth/session-cookie";
import { listOwnInvitations, makeInvitationLink, showInvitation } from "@/lib/data/invitations";
import type { PositionKind } from "@/lib/permissions/types";
import { actorOf } from "../helpers/actor-of";
import { as, cookieJar } from "../helpers/as";
import { redirectOf } from "../helpers/redirect-of";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

let world: World;
beforeAll(async () => {
  world = await makeWorld();
});
beforeEach(async () => {
  await db.delete(sessions);
});

type Invited = { token: string; personId: string; positionId: string; email: string };

/** A record and a position in a company, with an invitation to it. */
async function invite(
  name: string,
  options: { email?: string; kind?: PositionKind; companyId?: string; productionId?: string } = {},
): Promise<Invited> {
  const {
    companyId = world.companyId,
    productionId = world.productionId,
    kind = "actor",
    email = `${name.toLowerCase().replace(/\W+/g, ".")}.${newId().slice(-6)}@people.example`,
  } = options;
  const personId = newId();
  const positionId = newId();
  await db.insert(people).values({ id: personId, companyId, name, email });
  await db.insert(positions).values({ id: positionId, companyId, productionId, personId, kind });
  const link = new URL(
    await makeInvitationLink(db, { userId: world.people.md.userId }, { positionId, email }),
  );
  return { token: link.pathname.split("/").at(-1) ?? "", personId, positionId, email };
}

const loginOfCookie = async (): Promise<string | undefined> => {
  const [row] = await db
    .select({ userId: sessions.userId })
    .from(sessions)
    .where(eq(sessions.sessionToken, cookieJar().get(sessionCookieName()) ?? ""));
  return row?.userId;
};

describe("an invitation", () => {
  test("says who invites, into what and whom", async () => {
    const { token, email } = await invite("Ines Okafor");
    expect(await showInvitation(token)).toEqual({
      company: "Lantern Street Theatre",
      production: "The Tidewatcher",
      position: "Actor",
      name: "Ines Okafor",
      email,
      from: "Runa Oake",
    });
  });

  test("accepted, makes the login, links the record, signs in and goes on", async () => {
    const { token, email, personId } = await invite("Jonah Pell");
    expect(await redirectOf(acceptInvitation({ token, to: "/me/range" }))).toBe("/me/range");
    const [user] = await db.select().from(users).where(eq(users.email, email));
    expect(user).toMatchObject({ name: "Jonah Pell", emailVerified: expect.any(Date) });
    expect(await loginOfCookie()).toBe(user?.id);
    const actor = await actorOf(user?.id ?? "");
    expect(actor.positions).toEqual([
      { kind: "actor", companyId: world.companyId, productionId: world.productionId, personId },
    ]);
  });

  test("is accepted once: the second time it says so and signs nobody in", async () => {
    const { token } = await invite("Kirsi Vale");
    await redirectOf(acceptInvitation({ token, to: "" }));
    cookieJar().clear();
    expect(await acceptInvitation({ token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "refused", message: expect.stringMatching(/accepted already. Sign in/) },
    });
    expect(cookieJar().size).toBe(0);
    expect(await db.$count(sessions)).toBe(1);
  });

  test("accepted ten times at once makes one login and one session", async () => {
    const { token, email } = await invite("Lior Stamm");
    const answers = await Promise.allSettled(
      Array.from({ length: 10 }, () => redirectOf(acceptInvitation({ token, to: "" }))),
    );
    expect(answers.filter((answer) => answer.status === "fulfilled")).toHaveLength(1);
    expect(await db.$count(users, eq(users.email, email))).toBe(1);
    expect(await db.$count(sessions)).toBe(1);
  });

  test("that ran out, was never made, or whose position has ended does nothing", async () => {
    const old = await invite("Mona Reiss");
    await db
      .update(invitations)
      .set({ expiresAt: new Date(Date.now() - 1000) })
      .where(eq(invitations.positionId, old.positionId));
    expect(await acceptInvitation({ token: old.token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "refused", message: expect.stringMatching(/run out. Ask the company/) },
    });
    expect(await acceptInvitation({ token: "x".repeat(43), to: "" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    const ended = await invite("Nils Ebert");
    await db
      .update(positions)
      .set({ endedAt: new Date() })
      .where(eq(positions.id, ended.positionId));
    expect(await acceptInvitation({ token: ended.token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    const gone = await invite("Oona Fry");
    await db.update(people).set({ removedAt: new Date() }).where(eq(people.id, gone.personId));
    expect(await acceptInvitation({ token: gone.token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
    expect(await db.$count(sessions)).toBe(0);
  });

  test("leads to no other site", async () => {
    const { token } = await invite("Pia Stroud");
    expect(await redirectOf(acceptInvitation({ token, to: "//evil.example" }))).toBe(
      "/sign-in/done",
    );
  });

  test("opened by somebody else who is signed in: accepting signs the invited address in, not them", async () => {
    const { md } = world.people;
    const { token, email } = await invite("Quill Aster");
    as(md.userId);
    await redirectOf(acceptInvitation({ token, to: "" }));
    const [user] = await db.select({ id: users.id }).from(users).where(eq(users.email, email));
    expect(await loginOfCookie()).toBe(user?.id);
    expect((await actorOf(md.userId)).positions.map((p) => p.kind)).toEqual(["music_director"]);
  });

  test("a forwarded link signs nobody in as a login that was there before: it joins, and asks to sign in", async () => {
    const { otherActor } = world.people;
    const { token } = await invite("Dele Fashanu", {
      email: otherActor.email,
      companyId: world.otherCompanyId,
      productionId: world.otherProductionId,
    });
    expect(await redirectOf(acceptInvitation({ token, to: "/me/range" }))).toBe(
      `/sign-in?to=${encodeURIComponent("/me/range")}`,
    );
    expect(cookieJar().size).toBe(0);
    expect(await db.$count(sessions)).toBe(0);
    expect((await actorOf(otherActor.userId)).people).toHaveLength(2);
  });

  test("closes the person's other open links", async () => {
    const first = await invite("Sunniva Aal");
    const secret = newSecret();
    await db.insert(invitations).values({
      positionId: first.positionId,
      email: first.email,
      tokenHash: hashToken(secret),
      expiresAt: new Date(Date.now() + 86_400_000),
    });
    await redirectOf(acceptInvitation({ token: first.token, to: "" }));
    cookieJar().clear();
    expect(await acceptInvitation({ token: secret, to: "" })).toMatchObject({
      ok: false,
      error: { code: "refused" },
    });
    expect(cookieJar().size).toBe(0);
  });

  test("accepted by its own login that is signed in keeps the session it has", async () => {
    const { actor } = world.people;
    const { token } = await invite("Wren Tallis", {
      email: actor.email,
      companyId: world.otherCompanyId,
      productionId: world.otherProductionId,
    });
    as(actor.userId);
    await redirectOf(acceptInvitation({ token, to: "" }));
    expect(await db.$count(sessions)).toBe(0);
    expect((await actorOf(actor.userId)).people).toHaveLength(2);
  });

  test("to a record that belongs to another login is refused, and can still be put right", async () => {
    const { token, personId, positionId } = await invite("Ravi Thorne");
    await db.update(people).set({ userId: world.strangerId }).where(eq(people.id, personId));
    expect(await acceptInvitation({ token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "refused", message: expect.stringMatching(/another sign-in/) },
    });
    expect(
      await db
        .select({ acceptedAt: invitations.acceptedAt })
        .from(invitations)
        .where(eq(invitations.positionId, positionId)),
    ).toEqual([{ acceptedAt: null }]);
  });

  test("to a second record in a company the login is in already is refused in words", async () => {
    const { director } = world.people;
    await db
      .update(people)
      .set({ email: "old.address@people.example" })
      .where(eq(people.id, director.personId));
    const { token } = await invite("Odile Marsh", { email: director.email });
    expect(await acceptInvitation({ token, to: "" })).toMatchObject({
      ok: false,
      error: { code: "refused", message: expect.stringMatching(/in this company already/) },
    });
  });
});

describe("invitations that wait on one's own page", () => {
  test("are those to one's own proved address; nobody else sees or takes them", async () => {
    const userId = newId();
    const email = "saskia.wood@people.example";
    await db.insert(users).values({ id: userId, email, emailVerified: new Date() });
    const { positionId } = await invite("Saskia Wood", { email });
    const [waiting] = await listOwnInvitations(await actorOf(userId));
    expect(waiting).toMatchObject({
      company: "Lantern Street Theatre",
      position: "Actor",
      production: "The Tidewatcher",
      from: "Runa Oake",
    });
    expect(await listOwnInvitations(await actorOf(world.people.otherActor.userId))).toEqual([]);
    const input = { invitationId: waiting?.id ?? "" };
    for (const other of [world.people.otherActor, world.people.md, world.people.outsiderMd]) {
      as(other.userId);
      expect(await joinCompany(input)).toMatchObject({ ok: false, error: { code: "not-found" } });
    }
    as(null);
    expect(await joinCompany(input)).toMatchObject({ ok: false, error: { code: "signed-out" } });
    as(userId);
    expect(await joinCompany(input)).toMatchObject({ ok: true });
    expect((await actorOf(userId)).positions).toHaveLength(1);
    expect(await listOwnInvitations(await actorOf(userId))).toEqual([]);
    expect(await db.$count(invitations, eq(invitations.positionId, positionId))).toBe(1);
  });

  test("an address that nothing has proved sees none, and takes none", async () => {
    const userId = newId();
    const email = "tove.lind@people.example";
    await db.insert(users).values({ id: userId, email });
    const { positionId } = await invite("Tove Lind", { email });
    expect(await listOwnInvitations(await actorOf(userId))).toEqual([]);
    const [row] = await db
      .select({ id: invitations.id })
      .from(invitations)
      .where(eq(invitations.positionId, positionId));
    as(userId);
    expect(await joinCompany({ invitationId: row?.id ?? "" })).toMatchObject({
      ok: false,
      error: { code: "not-found" },
    });
  });
});
