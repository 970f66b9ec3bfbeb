import type { AddressInfo } from "node:net";
import { simpleParser } from "mailparser";
import { SMTPServer } from "smtp-server";
import { afterAll, beforeAll, beforeEach, expect, test, vi } from "vitest";
import { db } from "@/db/client";
import * as t from "@/db/schema";
import type { deliverOutbox } from "@/lib/data/deliver-outbox";
import { queueMail } from "@/lib/data/outbox";
import { countTry } from "@/lib/data/rate-limit";
import { emptyDatabase } from "../helpers/world";

// A real SMTP server on loopback: what is sent is read again by another library's parser.
const received: { to: string; subject: string; text: string }[] = [];
let refuse = false;
const server = new SMTPServer({
  // The sender keeps its connection for the next message.
  closeTimeout: 100,
  authOptional: true,
  disabledCommands: ["STARTTLS"],
  onRcptTo: (_address, _session, done) => {
    done(refuse ? new Error("451 try later") : null);
  },
  onData: (stream, session, done) => {
    void simpleParser(stream).then((mail) => {
      received.push({
        to: session.envelope.rcptTo[0]?.address ?? "",
        subject: mail.subject ?? "",
        text: mail.text ?? "",
      });
      done();
    });
  },
});

beforeAll(async () => {
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve));
  const port = (server.server.address() as AddressInfo).port;
  vi.doMock("@/lib/env", async (original) => {
    const real = await original<typeof import("@/lib/env")>();
    return { env: () => ({ ...real.env(), SMTP_URL: `smtp://127.0.0.1:${String(port)}` }) };
  });
});
afterAll(
  () =>
    new Promise<void>((resolve) =>
      server.close(() => {
        resolve();
      }),
    ),
);
beforeEach(async () => {
  await emptyDatabase();
  received.length = 0;
  refuse = false;
});

const mail = (dedupeKey: string) =>
  queueMail(db, {
    companyId: null,
    to: "singer@people.example",
    template: "sign-in",
    data: { link: "https://cembalo.example/sign-in/link?token=x", minutes: 30 },
    dedupeKey,
  });

test("queued twice, and worked on by three at once, a message goes out once", async () => {
  const { deliverOutbox: deliver } = await freshDelivery();
  await mail("one");
  await mail("one");
  const sent = await Promise.all([deliver(), deliver(), deliver()]);
  expect(sent.reduce((a, b) => a + b, 0)).toBe(1);
  expect(received).toHaveLength(1);
  expect(received[0]).toMatchObject({
    to: "singer@people.example",
    subject: "Your link to sign in to Cembalo",
  });
  expect(received[0]?.text).toContain("https://cembalo.example/sign-in/link?token=x");
  expect(await deliver()).toBe(0);
  // The secret in the link does not stay behind in the database.
  const [row] = await db.select({ data: t.outbox.data, sentAt: t.outbox.sentAt }).from(t.outbox);
  expect(row?.data).toEqual({});
  expect(row?.sentAt).toBeInstanceOf(Date);
});

test("a message the server does not take stays, is tried again later, and then goes out", async () => {
  const { deliverOutbox: deliver } = await freshDelivery();
  refuse = true;
  await mail("two");
  expect(await deliver()).toBe(0);
  const [failed] = await db.select().from(t.outbox);
  expect(failed).toMatchObject({ tries: 1, sentAt: null, gaveUpAt: null });
  expect(failed?.nextTryAt.getTime()).toBeGreaterThan(Date.now());
  refuse = false;
  expect(await deliver()).toBe(0);
  await db.update(t.outbox).set({ nextTryAt: new Date(Date.now() - 1000) });
  expect(await deliver()).toBe(1);
  expect(received).toHaveLength(1);
});

test("a sign-in link goes out before a batch that was queued earlier", async () => {
  const { deliverOutbox: deliver } = await freshDelivery();
  for (const n of [1, 2, 3]) {
    await queueMail(db, {
      companyId: null,
      to: `singer${String(n)}@people.example`,
      template: "password-changed",
      data: { name: "Someone" },
      dedupeKey: `batch-${String(n)}`,
    });
  }
  await mail("link");
  expect(await deliver()).toBe(4);
  expect(received[0]?.subject).toBe("Your link to sign in to Cembalo");
});

test("a message whose transaction is rolled back never existed", async () => {
  await expect(
    db.transaction(async (tx) => {
      await queueMail(tx, {
        companyId: null,
        to: "a@people.example",
        template: "sign-in",
        data: { link: "x", minutes: 1 },
        dedupeKey: "three",
      });
      throw new Error("changed my mind");
    }),
  ).rejects.toThrow("changed my mind");
  expect(await db.select().from(t.outbox)).toEqual([]);
});

test("tries are counted together by everyone who counts, and the window says how long to wait", async () => {
  const rule = { name: "test", limit: 10, windowSeconds: 900 };
  const tries = await Promise.allSettled(
    Array.from({ length: 25 }, () => countTry(rule, "somebody@people.example")),
  );
  expect(tries.filter((r) => r.status === "fulfilled").length).toBeLessThanOrEqual(10);
  await expect(countTry(rule, "somebody@people.example")).rejects.toMatchObject({
    code: "too-many",
  });
  await expect(countTry(rule, "another@people.example")).resolves.toBeUndefined();
  const keys = await db.select({ key: t.rateCounters.key }).from(t.rateCounters);
  expect(JSON.stringify(keys)).not.toContain("somebody");
});

// The transport is made once per module: a fresh one takes the server of this file.
async function freshDelivery(): Promise<{ deliverOutbox: typeof deliverOutbox }> {
  vi.resetModules();
  return import("@/lib/data/deliver-outbox");
}
