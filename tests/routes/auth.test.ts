import { eq } from "drizzle-orm";
import { NextRequest } from "next/server";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { requestLink } from "@/app/(public)/actions";
import { GET } from "@/app/api/auth/[...nextauth]/route";
import { db } from "@/db/client";
import { outbox, people, rateCounters, sessions, users, verificationTokens } from "@/db/schema";
import { redirectOf } from "../helpers/redirect-of";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const OWN = new URL(process.env["AUTH_URL"] ?? "http://localhost:3000");
let world: World;
beforeAll(async () => {
  world = await makeWorld();
});
beforeEach(async () => {
  await db.delete(rateCounters);
  await db.delete(outbox);
  await db.delete(sessions);
});

/** Asks for a link, and gives what the button of its page would send. */
async function askedLink(email: string, to = ""): Promise<URLSearchParams> {
  await redirectOf(requestLink({ email, to }));
  const [row] = await db
    .select({ data: outbox.data })
    .from(outbox)
    .where(eq(outbox.toEmail, email.toLowerCase()));
  return new URL(String(row?.data["link"])).searchParams;
}

const press = (fields: URLSearchParams | string): Promise<Response> =>
  GET(
    new NextRequest(new URL(`/api/auth/callback/nodemailer?${fields.toString()}`, OWN), {
      headers: { "user-agent": "test" },
    }),
  );

const leadsTo = (response: Response): URL => new URL(response.headers.get("location") ?? "", OWN);
const sessionCookie = (response: Response): string | undefined =>
  response.headers
    .getSetCookie()
    .find(
      (cookie) =>
        cookie.startsWith("authjs.session-token=") && !cookie.startsWith("authjs.session-token=;"),
    );

describe("the button of a sign-in link", () => {
  test("signs the address's login in, for thirty days, in a cookie that no script and no other site can use", async () => {
    const response = await press(await askedLink(world.people.actor.email, "/me/range"));
    expect(leadsTo(response).pathname).toBe("/me/range");
    const cookie = sessionCookie(response);
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    const rows = await db.select().from(sessions);
    expect(rows.map((row) => row.userId)).toEqual([world.people.actor.userId]);
    expect(cookie).toContain(rows[0]?.sessionToken);
    expect(rows[0]?.sessionToken).toMatch(/^[\w-]{43}$/);
    expect(Math.round(((rows[0]?.expires.getTime() ?? 0) - Date.now()) / 86_400_000)).toBe(30);
  });

  test("works once: pressed again it signs nobody in and says so", async () => {
    const fields = await askedLink(world.people.actor.email);
    expect(sessionCookie(await press(fields))).toBeDefined();
    const again = await press(fields);
    expect(leadsTo(again).pathname + leadsTo(again).search).toBe("/sign-in?error=Verification");
    expect(sessionCookie(again)).toBeUndefined();
    expect(await db.$count(sessions)).toBe(1);
  });

  test("pressed ten times at once, one of them signs in", async () => {
    const fields = await askedLink(world.people.actor.email);
    const answers = await Promise.all(Array.from({ length: 10 }, () => press(fields)));
    expect(answers.filter((answer) => sessionCookie(answer) !== undefined)).toHaveLength(1);
    expect(await db.$count(sessions)).toBe(1);
  });

  test("after its time it signs nobody in", async () => {
    const fields = await askedLink(world.people.actor.email);
    await db
      .update(verificationTokens)
      .set({ expires: new Date(Date.now() - 1000) })
      .where(eq(verificationTokens.identifier, world.people.actor.email));
    expect(leadsTo(await press(fields)).search).toBe("?error=Verification");
    expect(await db.$count(sessions)).toBe(0);
  });

  test("does not open another address", async () => {
    const fields = await askedLink(world.people.actor.email);
    fields.set("email", world.people.md.email);
    expect(leadsTo(await press(fields)).searchParams.get("error")).toBe("Verification");
    expect(await db.$count(sessions)).toBe(0);
  });

  test.each(["https://evil.example/", "//evil.example", "https://localhost:3000.evil.example/me"])(
    "changed to lead to %s afterwards, it stays on our site",
    async (callbackUrl) => {
      const fields = await askedLink(world.people.actor.email);
      fields.set("callbackUrl", callbackUrl);
      expect(leadsTo(await press(fields)).host).toBe(OWN.host);
    },
  );

  test("the database keeps only a hash of the secret", async () => {
    const fields = await askedLink(world.people.director.email);
    const [row] = await db
      .select()
      .from(verificationTokens)
      .where(eq(verificationTokens.identifier, world.people.director.email));
    expect(row?.token).toBeDefined();
    expect(row?.token).not.toBe(fields.get("token"));
  });
});

describe("the first sign-in of an address", () => {
  test("makes a login with the name that a company wrote down, and joins nothing by itself", async () => {
    await db.insert(people).values({
      companyId: world.companyId,
      name: "Ayo Lindqvist",
      email: "ayo.lindqvist@people.example",
    });
    await press(await askedLink("Ayo.Lindqvist@People.Example"));
    const [user] = await db
      .select()
      .from(users)
      .where(eq(users.email, "ayo.lindqvist@people.example"));
    expect(user).toMatchObject({ name: "Ayo Lindqvist", emailVerified: expect.any(Date) });
    const [record] = await db
      .select({ userId: people.userId })
      .from(people)
      .where(eq(people.email, "ayo.lindqvist@people.example"));
    expect(record?.userId).toBeNull();
  });

  test("of an address no company knows makes a login without a name", async () => {
    await press(await askedLink("new.here@people.example"));
    expect(
      await db
        .select({ name: users.name })
        .from(users)
        .where(eq(users.email, "new.here@people.example")),
    ).toEqual([{ name: null }]);
  });
});

test.each([
  "signin/nodemailer",
  "signout",
  "csrf",
  "session",
  "providers",
  "error",
  "callback/credentials",
])("nothing else of the sign-in library answers: %s", async (rest) => {
  const response = await GET(new NextRequest(new URL(`/api/auth/${rest}`, OWN)));
  expect(response.status).toBe(404);
  expect(response.headers.getSetCookie()).toEqual([]);
});
