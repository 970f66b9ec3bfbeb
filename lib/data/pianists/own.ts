import "server-only";
import { and, asc, eq, gt, inArray, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import {
  auditionRooms,
  blocks,
  called,
  calls,
  companies,
  numbers,
  people,
  pianistSessions,
  positions,
  productions,
  rooms,
  signUps,
  slotAssignments,
  slots,
  venues,
} from "@/db/schema";
import { BLOCK_KIND_NAMES, CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import { groupBy } from "@/lib/group-by";
import type { Actor } from "@/lib/permissions/types";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import { blockTimes } from "@/lib/schedule/block-times";
import type { Interval } from "@/lib/schedule/types";

/** One stretch at the piano: who sings, what, and what the pianist needs to know of it. */
export type OwnMusic = Interval & {
  id: string;
  label: string | null;
  title: string;
  key: string | null;
  /** Quarter notes a minute. */
  tempo: number | null;
  bars: string | null;
  detail: string | null;
  people: string[];
};

export type OwnSession = Interval & {
  sessionId: string;
  productionId: string;
  production: string;
  company: string;
  what: string;
  zone: string;
  room: string | null;
  venue: string | null;
  address: string | null;
  state: "assigned" | "confirmed";
  music: OwnMusic[];
  rests: Interval[];
  /** Music director and stage manager: the only people whose numbers are given. */
  contacts: { name: string; position: string; phone: string | null }[];
};

/**
 * The actor's own sessions as a pianist from `after` (now unless told) on, in order, in every company: where, with whom in
 * which order, what music, and when rests come. No notes, no casting, no contacts but the two who can be rung.
 */
export async function listOwnSessions(
  actor: Actor,
  { after = new Date() }: { after?: Date } = {},
): Promise<OwnSession[]> {
  const held = actor.positions.filter((position) => position.productionId !== null);
  const mine = [...new Set(held.map((position) => position.personId))];
  const productionIds = [...new Set(held.flatMap((position) => position.productionId ?? []))];
  if (mine.length === 0) return [];
  const rows = await db
    .select({
      sessionId: pianistSessions.id,
      productionId: productions.id,
      production: productions.title,
      company: companies.name,
      zone: companies.zone,
      auditionRoomId: pianistSessions.auditionRoomId,
      callId: pianistSessions.callId,
      from: pianistSessions.startsAt,
      to: pianistSessions.endsAt,
      state: pianistSessions.state,
      callKind: calls.kind,
      callRoomId: calls.roomId,
      auditionPlaceId: auditionRooms.roomId,
    })
    .from(pianistSessions)
    .innerJoin(
      productions,
      and(eq(productions.id, pianistSessions.productionId), isNull(productions.removedAt)),
    )
    .innerJoin(companies, eq(companies.id, productions.companyId))
    .leftJoin(calls, eq(calls.id, pianistSessions.callId))
    .leftJoin(auditionRooms, eq(auditionRooms.id, pianistSessions.auditionRoomId))
    .where(
      and(
        inArray(pianistSessions.personId, mine),
        inArray(pianistSessions.productionId, productionIds),
        gt(pianistSessions.endsAt, after),
      ),
    )
    .orderBy(asc(pianistSessions.startsAt), asc(pianistSessions.id));
  if (rows.length === 0) return [];
  const [places, contacts, sung, played] = await Promise.all([
    placesOf(rows.flatMap((row) => row.callRoomId ?? row.auditionPlaceId ?? [])),
    contactsOf([...new Set(rows.map((row) => row.productionId))]),
    auditionsIn(rows.flatMap((row) => row.auditionRoomId ?? [])),
    blocksIn(rows.flatMap((row) => row.callId ?? [])),
  ]);
  return rows.map(({ auditionRoomId, callId, callKind, callRoomId, auditionPlaceId, ...row }) => {
    const place = places.get(callRoomId ?? auditionPlaceId ?? "");
    const all =
      (auditionRoomId === null ? played.get(callId ?? "") : sung.get(auditionRoomId)) ?? [];
    const inside = all.filter((item) => item.from >= row.from && item.from < row.to);
    return {
      ...row,
      what: callKind === null ? "Auditions" : CALL_KIND_NAMES[callKind],
      room: place?.room ?? null,
      venue: place?.venue ?? null,
      address: place?.address ?? null,
      music: inside.filter((item) => !item.rest).map(({ rest: _rest, ...music }) => music),
      rests: inside.filter((item) => item.rest).map(({ from, to }) => ({ from, to })),
      contacts: (contacts.get(row.productionId) ?? []).map(({ name, kind, phone }) => ({
        name,
        position: POSITION_NAMES[kind],
        phone,
      })),
    };
  });
}

type Item = OwnMusic & { rest: boolean };

async function placesOf(roomIds: string[]) {
  if (roomIds.length === 0) return new Map<string, never>();
  const rows = await db
    .select({ id: rooms.id, room: rooms.name, venue: venues.name, address: venues.address })
    .from(rooms)
    .innerJoin(venues, eq(venues.id, rooms.venueId))
    .where(inArray(rooms.id, roomIds));
  return new Map(rows.map((row) => [row.id, row]));
}

async function contactsOf(productionIds: string[]) {
  const rows = await db
    .select({
      productionId: positions.productionId,
      name: people.name,
      kind: positions.kind,
      phone: people.phone,
    })
    .from(positions)
    .innerJoin(people, and(eq(people.id, positions.personId), isNull(people.removedAt)))
    .where(
      and(
        inArray(positions.productionId, productionIds),
        inArray(positions.kind, ["music_director", "stage_manager"]),
        isNull(positions.endedAt),
      ),
    )
    .orderBy(asc(positions.kind), asc(people.name));
  return groupBy(rows, (row) => row.productionId ?? "");
}

async function auditionsIn(roomIds: string[]): Promise<Map<string, Item[]>> {
  if (roomIds.length === 0) return new Map();
  const rows = await db
    .select({
      id: slots.id,
      roomId: slots.auditionRoomId,
      kind: slots.kind,
      from: slots.startsAt,
      to: slots.endsAt,
      name: people.name,
      song: signUps.song,
      bars: signUps.bars,
    })
    .from(slots)
    .leftJoin(slotAssignments, eq(slotAssignments.slotId, slots.id))
    .leftJoin(signUps, eq(signUps.id, slotAssignments.signUpId))
    .leftJoin(people, eq(people.id, signUps.personId))
    .where(inArray(slots.auditionRoomId, roomIds))
    .orderBy(asc(slots.startsAt));
  const shown = rows.filter(
    (row) => row.name !== null || row.kind === "rest" || row.kind === "lunch",
  );
  const byRoom = groupBy(shown, (row) => row.roomId);
  return new Map(
    [...byRoom].map(([roomId, theirs]) => [
      roomId,
      theirs.map((row) => ({
        id: row.id,
        from: row.from,
        to: row.to,
        label: null,
        title: row.song ?? "No song given yet: ask",
        key: null,
        tempo: null,
        bars: row.bars === null ? null : `${row.bars} bars`,
        detail: null,
        people: row.name === null ? [] : [row.name],
        rest: row.name === null,
      })),
    ]),
  );
}

async function blocksIn(callIds: string[]): Promise<Map<string, Item[]>> {
  if (callIds.length === 0) return new Map();
  const [rows, names] = await Promise.all([
    db
      .select({
        id: blocks.id,
        callId: blocks.callId,
        startsAt: calls.startsAt,
        kind: blocks.kind,
        minutes: blocks.minutes,
        blockTitle: blocks.title,
        bars: blocks.bars,
        detail: blocks.detail,
        label: numbers.label,
        numberTitle: numbers.title,
        key: numbers.keyName,
        tempo: numbers.tempo,
      })
      .from(blocks)
      .innerJoin(calls, eq(calls.id, blocks.callId))
      .leftJoin(numbers, eq(numbers.id, blocks.numberId))
      .where(inArray(blocks.callId, callIds))
      .orderBy(asc(blocks.callId), asc(blocks.place)),
    db
      .select({ blockId: called.blockId, name: people.name })
      .from(called)
      .innerJoin(blocks, eq(blocks.id, called.blockId))
      .innerJoin(people, eq(people.id, called.personId))
      .where(and(inArray(blocks.callId, callIds), eq(called.excused, false)))
      .orderBy(asc(people.name)),
  ]);
  const namesOf = groupBy(names, (row) => row.blockId);
  return new Map(
    [...groupBy(rows, (row) => row.callId)].map(([callId, theirs]) => [
      callId,
      blockTimes(theirs[0]?.startsAt ?? new Date(0), theirs).map((block) => ({
        id: block.id,
        from: block.from,
        to: block.to,
        label: block.label,
        title: block.numberTitle ?? block.blockTitle ?? BLOCK_KIND_NAMES[block.kind],
        key: block.key,
        tempo: block.tempo,
        bars: block.bars === null ? null : `bars ${block.bars}`,
        detail: block.detail,
        people: (namesOf.get(block.id) ?? []).map((row) => row.name),
        rest: block.kind === "break",
      })),
    ]),
  );
}
