import { and, eq } from "drizzle-orm";
import { beforeAll, beforeEach, describe, expect, test } from "vitest";
import { requestLink, signInWithPassword } from "@/app/(public)/actions";
import { db } from "@/db/client";
import { outbox, passwordHashes, rateCounters, sessions } from "@/db/schema";
import { hashPassword } from "@/lib/auth/password";
import { sessionCookieName } from "@/lib/auth/session-cookie";
import { cookieJar } from "../helpers/as";
import { redirectOf } from "../helpers/redirect-of";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

const PASSWORD = "four brass lanterns";
let world: World;
beforeAll(async () => {
  world = await makeWorld();
  await db
    .insert(passwordHashes)
    .values({ userId: world.people.md.userId, hash: await hashPassword(PASSWORD) });
});
beforeEach(async () => {
  await db.delete(rateCounters);
});

async function linksTo(email: string): Promise<URL[]> {
  const rows = await db
    .select({ data: outbox.data })
    .from(outbox)
    .where(and(eq(outbox.toEmail, email), eq(outbox.template, "sign-in")));
  return rows.map((row) => new URL(String(row.data["link"])));
}

describe("asking for a link", () => {
  test("a known and an unknown address get the same answer, and each a link", async () => {
    const known = await redirectOf(requestLink({ email: world.people.actor.email, to: "" }));
    const unknown = await redirectOf(requestLink({ email: "nobody.yet@people.example", to: "" }));
    expect(known).toBe("/sign-in/sent");
    expect(unknown).toBe(known);
    expect(await linksTo(world.people.actor.email)).toHaveLength(1);
    expect(await linksTo("nobody.yet@people.example")).toHaveLength(1);
  });

  test("the mail leads to our page with a button, not to what uses the link up", async () => {
    const [link] = await linksTo(world.people.actor.email);
    expect(link?.pathname).toBe("/sign-in/link");
    expect(link?.searchParams.get("email")).toBe(world.people.actor.email);
    expect(link?.searchParams.get("token")).toMatch(/^[0-9a-f]{64}$/);
  });

  test("an address is one address, however its letters are typed", async () => {
    await redirectOf(requestLink({ email: "  Shouting.Person@People.Example ", to: "" }));
    expect(await linksTo("shouting.person@people.example")).toHaveLength(1);
  });

  test.each([
    "",
    "nobody",
    "a@b.example, c@d.example",
    "a@b.example\r\nBcc: c@d.example",
    `${"a".repeat(250)}@b.example`,
  ])("%j is refused beside its field", async (email) => {
    const before = await db.$count(outbox);
    expect(await requestLink({ email, to: "" })).toMatchObject({
      ok: false,
      error: { code: "invalid", fields: { email: expect.any(String) } },
    });
    expect(await db.$count(outbox)).toBe(before);
  });

  test.each([
    ["/me/range", "/me/range"],
    ["//evil.example", "/sign-in/done"],
    ["https://evil.example/me", "/sign-in/done"],
    ["/\\evil.example", "/sign-in/done"],
    ["/x/..//evil.example", "/sign-in/done"],
    ["", "/sign-in/done"],
  ])("asked to go to %j afterwards, the link leads to %s on our own site", async (to, path) => {
    const email = `to.${String(Math.random()).slice(2)}@people.example`;
    await redirectOf(requestLink({ email, to }));
    const [link] = await linksTo(email);
    const callback = new URL(link?.searchParams.get("callbackUrl") ?? "", link);
    expect(callback.host).toBe(link?.host);
    expect(callback.pathname).toBe(path);
  });

  test("the sixth link to one address within a quarter of an hour is refused, whatever its letters; other addresses go on", async () => {
    for (let i = 0; i < 5; i += 1)
      await redirectOf(requestLink({ email: "often@people.example", to: "" }));
    expect(await requestLink({ email: "OFTEN@people.example", to: "" })).toMatchObject({
      ok: false,
      error: { code: "too-many", message: expect.stringMatching(/Wait \d+ min/) },
    });
    expect(await linksTo("often@people.example")).toHaveLength(5);
    expect(await redirectOf(requestLink({ email: "seldom@people.example", to: "" }))).toBe(
      "/sign-in/sent",
    );
  });

  test("one source cannot send to one address after another without end", async () => {
    for (let i = 0; i < 40; i += 1)
      await redirectOf(requestLink({ email: `n${String(i)}@people.example`, to: "" }));
    expect(await requestLink({ email: "n41@people.example", to: "" })).toMatchObject({
      ok: false,
      error: { code: "too-many" },
    });
  });
});

describe("signing in with a password", () => {
  const refusal = {
    ok: false,
    error: {
      code: "refused",
      message: "Address and password do not fit together. Try again, or ask for a link by e-mail.",
    },
  };

  test("the right one begins a session of that login and leads where it was asked to", async () => {
    const { md } = world.people;
    expect(
      await redirectOf(
        signInWithPassword({
          email: md.email.toUpperCase(),
          password: PASSWORD,
          to: "/productions",
        }),
      ),
    ).toBe("/productions");
    const token = cookieJar().get(sessionCookieName());
    expect(token).toMatch(/^[\w-]{43}$/);
    const [session] = await db
      .select()
      .from(sessions)
      .where(eq(sessions.sessionToken, token ?? ""));
    expect(session?.userId).toBe(md.userId);
    const days = ((session?.expires.getTime() ?? 0) - Date.now()) / 86_400_000;
    expect(Math.round(days)).toBe(30);
  });

  test("a session from before, in the same browser, is ended", async () => {
    const { md } = world.people;
    await redirectOf(signInWithPassword({ email: md.email, password: PASSWORD, to: "" }));
    const first = cookieJar().get(sessionCookieName()) ?? "";
    await redirectOf(signInWithPassword({ email: md.email, password: PASSWORD, to: "" }));
    expect(cookieJar().get(sessionCookieName())).not.toBe(first);
    expect(await db.$count(sessions, eq(sessions.sessionToken, first))).toBe(0);
  });

  test("a wrong one, an unknown address and one without a password get word for word the same answer, and no session", async () => {
    const before = await db.$count(sessions);
    expect(
      await signInWithPassword({
        email: world.people.md.email,
        password: "four brass lantern",
        to: "",
      }),
    ).toEqual(refusal);
    expect(
      await signInWithPassword({ email: "nobody@people.example", password: PASSWORD, to: "" }),
    ).toEqual(refusal);
    expect(
      await signInWithPassword({ email: world.people.actor.email, password: PASSWORD, to: "" }),
    ).toEqual(refusal);
    expect(await db.$count(sessions)).toBe(before);
    expect(cookieJar().size).toBe(0);
  });

  test("after eight tries the right one is refused too, until the window is over", async () => {
    const { md } = world.people;
    for (let i = 0; i < 8; i += 1)
      await signInWithPassword({ email: md.email, password: `guess number ${String(i)}`, to: "" });
    expect(await signInWithPassword({ email: md.email, password: PASSWORD, to: "" })).toMatchObject(
      { ok: false, error: { code: "too-many" } },
    );
    await db
      .update(rateCounters)
      .set({ windowStart: new Date(Date.now() - 3_600_000) })
      .where(eq(rateCounters.hits, rateCounters.hits));
    expect(
      await redirectOf(signInWithPassword({ email: md.email, password: PASSWORD, to: "" })),
    ).toBe("/sign-in/done");
  });

  test("another site is never where it leads", async () => {
    expect(
      await redirectOf(
        signInWithPassword({
          email: world.people.md.email,
          password: PASSWORD,
          to: "//evil.example",
        }),
      ),
    ).toBe("/sign-in/done");
  });
});
