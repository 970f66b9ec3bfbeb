import { eq } from "drizzle-orm";
import { beforeEach, describe, expect, test } from "vitest";
import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { databaseErrno, duplicateKey, inTransaction } from "@/lib/data/transaction";
import { makeWorld } from "../helpers/world";
import type { World } from "../helpers/world";

// The keys themselves, without any of the application's checks in front of them.
let world: World;
let dayId: string;
let auditionRoomId: string;
beforeEach(async () => {
  world = await makeWorld();
  dayId = newId();
  auditionRoomId = newId();
  await db.insert(t.auditionDays).values({
    id: dayId,
    productionId: world.productionId,
    localDate: "2027-03-20",
    zone: "Europe/London",
    slotMinutes: 8,
  });
  await db
    .insert(t.auditionRooms)
    .values({ id: auditionRoomId, dayId, roomId: world.roomId, opensAt: at(10), closesAt: at(16) });
});

const at = (hour: number, minute = 0) => new Date(Date.UTC(2027, 2, 20, hour, minute));

async function addCall(from: Date, to: Date): Promise<string> {
  const id = newId();
  await db.insert(t.calls).values({
    id,
    productionId: world.productionId,
    kind: "music",
    startsAt: from,
    endsAt: to,
    localDate: "2027-03-20",
    localTime: "10:00",
    zone: "Europe/London",
  });
  return id;
}

async function outcome(work: Promise<unknown>): Promise<string> {
  return work.then(
    () => "written",
    (error: unknown) => duplicateKey(error) ?? `errno ${String(databaseErrno(error))}`,
  );
}

describe("a room", () => {
  const book = async (from: Date, to: Date) => {
    const callId = await addCall(from, to);
    return outcome(
      db
        .insert(t.roomBookings)
        .values({ roomId: world.roomId, startsAt: from, endsAt: to, callId }),
    );
  };

  test("cannot be held twice at once, but back to back", async () => {
    expect(await book(at(10), at(12))).toBe("written");
    expect(await book(at(11, 59), at(13))).toBe("room_bookings_held");
    expect(await book(at(9), at(17))).toBe("room_bookings_held");
    expect(await book(at(10, 30), at(11))).toBe("room_bookings_held");
    expect(await book(at(12), at(13))).toBe("written");
  });

  test("of fifty who want it at once, one gets it", async () => {
    const callIds = await Promise.all(Array.from({ length: 50 }, () => addCall(at(18), at(20))));
    const outcomes = await Promise.all(
      callIds.map((callId) =>
        outcome(
          inTransaction((tx) =>
            tx
              .insert(t.roomBookings)
              .values({ roomId: world.roomId, startsAt: at(18), endsAt: at(20), callId }),
          ),
        ),
      ),
    );
    expect(outcomes.filter((o) => o === "written")).toHaveLength(1);
    expect(outcomes.filter((o) => o === "room_bookings_held")).toHaveLength(49);
    expect(await db.select().from(t.roomBookings)).toHaveLength(1);
  });

  test("is held for exactly one thing", async () => {
    const callId = await addCall(at(8), at(9));
    // 4025: a CHECK constraint failed (MariaDB error code list).
    expect(
      await outcome(
        db.insert(t.roomBookings).values({ roomId: world.roomId, startsAt: at(8), endsAt: at(9) }),
      ),
    ).toBe("errno 4025");
    expect(
      await outcome(
        db
          .insert(t.roomBookings)
          .values({ roomId: world.roomId, startsAt: at(8), endsAt: at(9), callId, auditionRoomId }),
      ),
    ).toBe("errno 4025");
  });
});

describe("a pianist", () => {
  const play = async (
    who: { personId: string; userId: string },
    from: Date,
    to: Date,
    productionId = world.productionId,
  ) => {
    const callId = await addCall(from, to);
    return outcome(
      db.insert(t.pianistSessions).values({
        productionId,
        personId: who.personId,
        bookeeId: who.userId,
        startsAt: from,
        endsAt: to,
        callId,
      }),
    );
  };

  test("cannot be taken twice at once, not even by two companies", async () => {
    const pianist = world.people.accompanist;
    expect(await play(pianist, at(10), at(13))).toBe("written");
    expect(await play(pianist, at(12), at(14))).toBe("pianist_sessions_held");
    const there = newId();
    await db.insert(t.people).values({
      id: there,
      companyId: world.otherCompanyId,
      userId: pianist.userId,
      name: pianist.name,
    });
    expect(
      await play(
        { personId: there, userId: pianist.userId },
        at(12),
        at(14),
        world.otherProductionId,
      ),
    ).toBe("pianist_sessions_held");
    expect(await play(pianist, at(13), at(14))).toBe("written");
  });
});

describe("a slot", () => {
  const slot = async (from: Date, to: Date) => {
    const id = newId();
    await db
      .insert(t.slots)
      .values({ id, auditionRoomId, kind: "slot", startsAt: from, endsAt: to });
    return id;
  };
  const signUp = async (personId: string, place: number) => {
    const id = newId();
    await db.insert(t.signUps).values({ id, productionId: world.productionId, personId, place });
    return id;
  };

  test("of a room never overlaps another", async () => {
    await slot(at(10), at(10, 8));
    expect(await outcome(slot(at(10, 7), at(10, 15)))).toBe("slots_held");
    expect(await outcome(slot(at(10, 8), at(10, 16)))).not.toBe("slots_held");
  });

  test("takes one singer, and a singer one slot a day", async () => {
    const one = await signUp(world.people.actor.personId, 1);
    const two = await signUp(world.people.otherActor.personId, 2);
    const first = await slot(at(10), at(10, 8));
    const second = await slot(at(10, 8), at(10, 16));
    expect(
      await outcome(db.insert(t.slotAssignments).values({ slotId: first, signUpId: one, dayId })),
    ).toBe("written");
    expect(
      await outcome(db.insert(t.slotAssignments).values({ slotId: first, signUpId: two, dayId })),
    ).toBe("PRIMARY");
    expect(
      await outcome(db.insert(t.slotAssignments).values({ slotId: second, signUpId: one, dayId })),
    ).toBe("slot_assignments_day");
  });

  test("a singer signs up once for a production", async () => {
    await signUp(world.people.actor.personId, 1);
    expect(await outcome(signUp(world.people.actor.personId, 2))).toBe("sign_ups_once");
  });
});

describe("positions and people", () => {
  test("a position is held once while open, and may be held again after it ended", async () => {
    const again = () =>
      outcome(
        db.insert(t.positions).values({
          companyId: world.companyId,
          personId: world.people.actor.personId,
          productionId: world.productionId,
          kind: "actor",
        }),
      );
    expect(await again()).toBe("positions_open");
    await db
      .update(t.positions)
      .set({ endedAt: new Date() })
      .where(eq(t.positions.personId, world.people.actor.personId));
    expect(await again()).toBe("written");
    expect(await again()).toBe("positions_open");
  });

  test("an address is one person in a company, whatever its company", async () => {
    const same = (companyId: string, email: string) =>
      outcome(db.insert(t.people).values({ companyId, name: "Someone", email }));
    expect(await same(world.companyId, world.people.actor.email)).toBe("people_company_email");
    expect(await same(world.otherCompanyId, world.people.actor.email)).toBe("written");
    // Addresses are compared byte by byte: an accent makes another address.
    expect(await same(world.companyId, "zoe@people.example")).toBe("written");
    expect(await same(world.companyId, "zoë@people.example")).toBe("written");
  });
});

describe("impossible rows", () => {
  test("are refused by checks and foreign keys", async () => {
    expect(
      await outcome(
        db
          .insert(t.ranges)
          .values({ personId: world.people.actor.personId, kind: "heard", low: 70, high: 60 }),
      ),
    ).toBe("errno 4025");
    expect(
      await outcome(
        db.insert(t.conflicts).values({
          personId: world.people.actor.personId,
          startsAt: at(12),
          endsAt: at(11),
          localFrom: "2027-03-20",
          localTo: "2027-03-20",
          zone: "UTC",
        }),
      ),
    ).toBe("errno 4025");
    // 1452: the row of another table that it names does not exist.
    expect(
      await outcome(
        db
          .insert(t.signUps)
          .values({ productionId: newId(), personId: world.people.actor.personId, place: 1 }),
      ),
    ).toBe("errno 1452");
  });
});
