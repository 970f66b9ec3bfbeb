import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import type { Tx } from "@/db/client";
import {
  attendances,
  auditionDays,
  auditionRooms,
  dayLinks,
  people,
  productions,
  rooms,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import { hashToken } from "@/lib/auth/hash-token";
import type { DoorItem, DoorView } from "@/lib/auditions/door-view";
import { AppError } from "@/lib/errors";
import { clock, localDay, longDay } from "@/lib/format-dates";
import type { doorActSchema } from "@/lib/schemas/auditions";
import { recordAudit } from "../audit";
import { countTry, RATES } from "../rate-limit";
import { inTransaction } from "../transaction";

/** The day a monitor's link is for. A link that is not one counts against its source. Throws `not-found` or `too-many`. */
async function dayOfLink(token: string, source: string) {
  const [day] = await db
    .select({
      id: auditionDays.id,
      localDate: auditionDays.localDate,
      zone: auditionDays.zone,
      slotMinutes: auditionDays.slotMinutes,
      productionId: productions.id,
      companyId: productions.companyId,
    })
    .from(dayLinks)
    .innerJoin(auditionDays, eq(auditionDays.id, dayLinks.dayId))
    .innerJoin(productions, eq(productions.id, auditionDays.productionId))
    .where(
      and(
        eq(dayLinks.tokenHash, hashToken(token)),
        isNull(dayLinks.revokedAt),
        isNull(auditionDays.removedAt),
        isNull(productions.removedAt),
      ),
    );
  if (day) return day;
  await countTry(RATES.linkFromSource, source);
  throw new AppError("not-found", "This link opens nothing. Ask the stage manager for a new one.");
}

type LinkDay = Awaited<ReturnType<typeof dayOfLink>>;

function closedNotice(day: LinkDay, now: Date): string | null {
  const today = localDay(now, day.zone);
  if (today === day.localDate) return null;
  const when = longDay(day.localDate);
  return today < day.localDate
    ? `This link opens on ${when}, at midnight in ${day.zone.split("/").at(-1)?.replaceAll("_", " ") ?? day.zone}. Come back on the day.`
    : `This link was for ${when}, which is over. Ask the stage manager for the next day's link.`;
}

/**
 * What the monitor sees: per room the running order with name, time and state, and nothing more of anyone. On any other
 * day than its own the link only says when it opens. `now` is the clock. Throws `not-found` or `too-many`.
 */
export async function readDoor(token: string, source: string, now = new Date()): Promise<DoorView> {
  const day = await dayOfLink(token, source);
  const notice = closedNotice(day, now);
  if (notice !== null) return { open: false, notice };
  const rows = await db
    .select({
      roomId: auditionRooms.id,
      room: rooms.name,
      id: slots.id,
      kind: slots.kind,
      startsAt: slots.startsAt,
      endsAt: slots.endsAt,
      signUpId: signUps.id,
      name: people.name,
      signUpState: signUps.state,
      hereAt: attendances.hereAt,
      inAt: attendances.inAt,
      outAt: attendances.outAt,
    })
    .from(auditionRooms)
    .innerJoin(rooms, eq(rooms.id, auditionRooms.roomId))
    .innerJoin(slots, eq(slots.auditionRoomId, auditionRooms.id))
    .leftJoin(slotAssignments, eq(slotAssignments.slotId, slots.id))
    .leftJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
    .leftJoin(people, eq(people.id, signUps.personId))
    .leftJoin(attendances, and(eq(attendances.signUpId, signUps.id), eq(attendances.dayId, day.id)))
    .where(eq(auditionRooms.dayId, day.id))
    .orderBy(asc(rooms.name), asc(slots.startsAt));
  const view: Extract<DoorView, { open: true }> = {
    open: true,
    day: longDay(day.localDate),
    zone: day.zone,
    now: now.toISOString(),
    slotMinutes: day.slotMinutes,
    rooms: [],
  };
  for (const row of rows) {
    let room = view.rooms.find((r) => r.id === row.roomId);
    if (!room) {
      room = { id: row.roomId, name: row.room, items: [] };
      view.rooms.push(room);
    }
    const pause = row.kind === "rest" || row.kind === "lunch" ? row.kind : null;
    if (pause === null && row.signUpId === null) continue;
    room.items.push({
      id: row.id,
      kind: pause ?? "singer",
      startsAt: row.startsAt.toISOString(),
      endsAt: row.endsAt.toISOString(),
      signUpId: row.signUpId,
      name: row.name,
      state: pause === null ? stateOf(row) : null,
      inAt: row.inAt?.toISOString() ?? null,
    });
  }
  return view;
}

function stateOf(row: {
  signUpState: string | null;
  hereAt: Date | null;
  inAt: Date | null;
  outAt: Date | null;
}): DoorItem["state"] {
  if (row.outAt !== null) return "heard";
  if (row.inAt !== null) return "inside";
  if (row.hereAt !== null) return "here";
  return row.signUpState === "declined" ? "not coming" : "not here yet";
}

/**
 * The monitor marks a singer as here, sends them in, or has them out; "not-here" takes "here" back. Sending somebody in
 * shows whoever was inside out: one singer at a time in a room. Throws `refused` on another day or out of order.
 */
export async function actAtDoor(
  input: z.output<typeof doorActSchema>,
  source: string,
  now = new Date(),
): Promise<void> {
  const day = await dayOfLink(input.token, source);
  const notice = closedNotice(day, now);
  if (notice !== null) throw new AppError("refused", notice);
  await inTransaction(async (tx) => {
    await tx
      .select({ id: auditionDays.id })
      .from(auditionDays)
      .where(eq(auditionDays.id, day.id))
      .for("update");
    const [singer] = await tx
      .select({
        signUpId: signUps.id,
        name: people.name,
        roomId: slots.auditionRoomId,
        startsAt: slots.startsAt,
      })
      .from(slotAssignments)
      .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
      .innerJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
      .innerJoin(people, eq(people.id, signUps.personId))
      .where(and(eq(slotAssignments.dayId, day.id), eq(slotAssignments.signUpId, input.signUpId)));
    if (!singer) throw new AppError("not-found", "That singer has no slot on this day any more.");
    const [kept] = await tx
      .select()
      .from(attendances)
      .where(and(eq(attendances.dayId, day.id), eq(attendances.signUpId, singer.signUpId)));
    const next = marked(
      input.act,
      { hereAt: kept?.hereAt ?? null, inAt: kept?.inAt ?? null, outAt: kept?.outAt ?? null },
      now,
      singer.name,
    );
    if (input.act === "in") await showOthersOut(tx, day.id, singer, now);
    await tx
      .insert(attendances)
      .values({ dayId: day.id, signUpId: singer.signUpId, ...next })
      .onDuplicateKeyUpdate({ set: next });
    await recordAudit(tx, null, {
      companyId: day.companyId,
      productionId: day.productionId,
      action: `door.${input.act}`,
      subjectKind: "sign_up",
      subjectId: singer.signUpId,
      summary: `${singer.name}: ${{ here: "here", "not-here": "not here after all", in: "sent in", out: "out" }[input.act]} at ${clock(now, day.zone)}`,
    });
  });
}

type Marks = { hereAt: Date | null; inAt: Date | null; outAt: Date | null };

function marked(
  act: z.output<typeof doorActSchema>["act"],
  marks: Marks,
  now: Date,
  name: string,
): Marks {
  switch (act) {
    case "here":
      return { ...marks, hereAt: marks.hereAt ?? now };
    case "not-here":
      if (marks.inAt !== null) throw new AppError("refused", `${name} has been inside already.`);
      return { hereAt: null, inAt: null, outAt: null };
    case "in":
      return { hereAt: marks.hereAt ?? now, inAt: now, outAt: null };
    case "out":
      if (marks.inAt === null)
        throw new AppError("refused", `${name} has not been sent in. Press “Send in” first.`);
      return { ...marks, outAt: marks.outAt ?? now };
  }
}

async function showOthersOut(
  tx: Tx,
  dayId: string,
  singer: { signUpId: string; roomId: string },
  now: Date,
): Promise<void> {
  const inside = await tx
    .select({ signUpId: attendances.signUpId, inAt: attendances.inAt })
    .from(attendances)
    .innerJoin(
      slotAssignments,
      and(eq(slotAssignments.signUpId, attendances.signUpId), eq(slotAssignments.dayId, dayId)),
    )
    .innerJoin(slots, eq(slots.id, slotAssignments.slotId))
    .where(
      and(
        eq(attendances.dayId, dayId),
        eq(slots.auditionRoomId, singer.roomId),
        isNull(attendances.outAt),
      ),
    );
  const ids = inside
    .filter((row) => row.inAt !== null && row.signUpId !== singer.signUpId)
    .map((row) => row.signUpId);
  if (ids.length === 0) return;
  await tx
    .update(attendances)
    .set({ outAt: now })
    .where(and(eq(attendances.dayId, dayId), inArray(attendances.signUpId, ids)));
}
