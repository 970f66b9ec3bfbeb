import { addMinutes } from "date-fns";
import { eq } from "drizzle-orm";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  blocks,
  called,
  calls,
  choices,
  conflicts,
  people,
  pianistSessions,
  productions,
  ranges,
  roomBookings,
} from "@/db/schema";
import type { Companies } from "./cast-of-the-demo";
import { at, dayFromToday, give, joinCompany, weekday, ZONE } from "./context";
import { inventedEmail, inventedName } from "./names";
import { addReadNumber, addRoles, addTypedNumber } from "./score-rows";
import { inventedRange } from "./voices";
import type { VoiceKind } from "./voices";

const CAST: [role: string, voice: VoiceKind, people: number][] = [
  ["Tessaly", "mezzo", 1],
  ["Corrin", "tenor", 1],
  ["The Landlady", "alto", 1],
  ["Mr Quill", "baritone", 1],
  ["Alto", "alto", 3],
  ["Tenor", "tenor", 3],
  ["First bass", "baritone", 3],
  ["Second bass", "bass", 3],
];

/** In rehearsals: cast and published, with calls this week and next, one of them a draft with a clash to solve. */
export async function seedMarrowStreet(tx: Tx, companies: Companies): Promise<string> {
  const companyId = companies.lantern;
  const productionId = newId();
  await tx.insert(productions).values({
    id: productionId,
    companyId,
    title: "Marrow Street",
    stage: "rehearsals",
    opensOn: dayFromToday(24),
    closesOn: dayFromToday(33),
    castPublishedAt: new Date(),
  });
  const who = companies.atLantern;
  await give(tx, companyId, who.md, "music_director", productionId);
  await give(tx, companyId, who.stageManager, "stage_manager", productionId);
  await give(tx, companyId, who.director, "director", productionId);
  await give(tx, companyId, who.hanne, "accompanist", productionId);
  await give(tx, companyId, who.osric, "accompanist", productionId);

  const roleIds = await addRoles(
    tx,
    productionId,
    CAST.map(([name, , needed]) => [
      name,
      needed > 1 ? "ensemble" : "principal",
      needed,
      needed > 1 ? 0 : 1,
    ]),
  );
  const opening = await addTypedNumber(
    tx,
    productionId,
    1,
    {
      label: "1",
      title: "Shutters Up",
      key: "C",
      fifths: 0,
      seconds: 210,
      bars: 104,
      tempo: 120,
      lines: { Tessaly: [57, 74], "Mr Quill": [45, 62], Alto: [55, 72], Tenor: [48, 67] },
    },
    roleIds,
  );
  const duet = await addTypedNumber(
    tx,
    productionId,
    2,
    {
      label: "2",
      title: "Across the Landing",
      key: "A♭",
      fifths: -4,
      seconds: 190,
      bars: 70,
      tempo: 76,
      lines: { Tessaly: [58, 75], Corrin: [51, 68] },
    },
    roleIds,
  );
  const rent = await addTypedNumber(
    tx,
    productionId,
    3,
    {
      label: "3",
      title: "The Rent Song",
      key: "D",
      fifths: 2,
      seconds: 150,
      bars: 96,
      tempo: 144,
      lines: { "The Landlady": [54, 71], "Mr Quill": [45, 64], Corrin: [50, 66] },
    },
    roleIds,
  );
  const partsong = await addReadNumber(
    tx,
    { id: productionId, companyId },
    4,
    "4",
    "sullivan-the-long-day-closes.mxl",
    { P1: ["Alto", "8vb"], P2: "Tenor", P3: "First bass", P4: "Second bass" },
    roleIds,
  );
  const lullaby = await addTypedNumber(
    tx,
    productionId,
    5,
    {
      label: "5",
      title: "Upstairs Window",
      key: "F",
      fifths: -1,
      seconds: 175,
      bars: 60,
      tempo: 66,
      lines: { Tessaly: [57, 77] },
    },
    roleIds,
  );
  const finale = await addTypedNumber(
    tx,
    productionId,
    6,
    {
      label: "6",
      title: "Marrow Street, Morning",
      key: "G",
      fifths: 1,
      seconds: 260,
      bars: 130,
      tempo: 108,
      lines: {
        Tessaly: [58, 76],
        Corrin: [50, 69],
        "The Landlady": [55, 72],
        "Mr Quill": [43, 63],
        Alto: [55, 72],
        Tenor: [48, 67],
        "First bass": [43, 62],
        "Second bass": [41, 58],
      },
    },
    roleIds,
  );

  const castOf: Record<string, string[]> = {};
  let index = 0;
  for (const [role, voice, count] of CAST) {
    const roleId = roleIds[role];
    if (!roleId) continue;
    for (let n = 0; n < count; n += 1, index += 1) {
      const name = inventedName(80 + index);
      const demo =
        role === "Corrin" ? who.teodor : role === "Alto" && n === 0 ? who.wren : undefined;
      const personId =
        demo ??
        (await joinCompany(
          tx,
          companyId,
          { userId: null, name, email: inventedEmail(name) },
          { minor: role === "Alto" && n === 2 },
        ));
      await give(tx, companyId, personId, "actor", productionId);
      if (demo !== who.wren)
        await tx
          .insert(ranges)
          .values({ personId, kind: "heard", ...inventedRange(voice, 400 + index), productionId });
      await tx.insert(choices).values({ productionId, roleId, personId, state: "cast" });
      (castOf[role] ??= []).push(personId);
    }
  }
  // Understudies and a rehearsal company, so that lists are as long as they are in life.
  for (let extra = 0; extra < 20; extra += 1) {
    const name = inventedName(104 + extra);
    await joinCompany(tx, companyId, {
      userId: null,
      name,
      email: inventedEmail(name, "company.example"),
    });
  }

  const sings: Record<string, string[]> = {
    [opening]: ["Tessaly", "Mr Quill", "Alto", "Tenor"],
    [duet]: ["Tessaly", "Corrin"],
    [rent]: ["The Landlady", "Mr Quill", "Corrin"],
    [partsong]: ["Alto", "Tenor", "First bass", "Second bass"],
    [lullaby]: ["Tessaly"],
    [finale]: CAST.map(([role]) => role),
  };
  const plan: {
    day: string;
    time: string;
    kind: "music" | "staging" | "tech" | "performance";
    room: string;
    pianist: string | null;
    state: "published" | "draft";
    numbers: [string, number][];
  }[] = [
    {
      day: dayFromToday(0),
      time: "18:30",
      kind: "music",
      room: companies.rooms.hall,
      pianist: who.osric,
      state: "published",
      numbers: [
        [opening, 30],
        [duet, 35],
        [partsong, 45],
      ],
    },
    {
      day: dayFromToday(1),
      time: "18:30",
      kind: "music",
      room: companies.rooms.two,
      pianist: who.osric,
      state: "published",
      numbers: [
        [rent, 30],
        [lullaby, 25],
        [finale, 50],
      ],
    },
    {
      day: dayFromToday(3),
      time: "18:30",
      kind: "staging",
      room: companies.rooms.hall,
      pianist: null,
      state: "published",
      numbers: [
        [opening, 60],
        [finale, 75],
      ],
    },
    {
      day: weekday(6, 0),
      time: "14:00",
      kind: "music",
      room: companies.rooms.one,
      pianist: who.hanne,
      state: "draft",
      numbers: [
        [partsong, 40],
        [duet, 40],
        [finale, 45],
      ],
    },
    {
      day: dayFromToday(8),
      time: "18:30",
      kind: "music",
      room: companies.rooms.one,
      pianist: who.hanne,
      state: "published",
      numbers: [
        [finale, 60],
        [rent, 45],
      ],
    },
    {
      day: dayFromToday(10),
      time: "18:30",
      kind: "staging",
      room: companies.rooms.hall,
      pianist: who.osric,
      state: "published",
      numbers: [[finale, 90]],
    },
    {
      day: dayFromToday(21),
      time: "14:00",
      kind: "tech",
      room: companies.rooms.hall,
      pianist: null,
      state: "published",
      numbers: [
        [opening, 120],
        [finale, 120],
      ],
    },
    {
      day: dayFromToday(24),
      time: "19:30",
      kind: "performance",
      room: companies.rooms.hall,
      pianist: null,
      state: "published",
      numbers: [[finale, 140]],
    },
  ];
  for (const call of plan) {
    const startsAt = at(call.day, call.time);
    const minutes = call.numbers.reduce((sum, [, m]) => sum + m, 0) + 15;
    const endsAt = addMinutes(startsAt, minutes);
    const callId = newId();
    await tx.insert(calls).values({
      id: callId,
      productionId,
      kind: call.kind,
      startsAt,
      endsAt,
      localDate: call.day,
      localTime: call.time,
      zone: ZONE,
      roomId: call.room,
      leaderId: who.md,
      pianistId: call.pianist,
      state: call.state,
    });
    const rows = call.numbers.flatMap(([numberId, m], place) => [
      ...(place === 1 ? [{ numberId: null, minutes: 15 }] : []),
      { numberId, minutes: m },
    ]);
    if (call.numbers.length === 1) rows.push({ numberId: null, minutes: 15 });
    for (const [place, row] of rows.entries()) {
      const blockId = newId();
      await tx.insert(blocks).values({
        id: blockId,
        callId,
        place: place + 1,
        kind: row.numberId ? "number" : "break",
        minutes: row.minutes,
        numberId: row.numberId,
      });
      if (!row.numberId) continue;
      const needed = new Set((sings[row.numberId] ?? []).flatMap((role) => castOf[role] ?? []));
      for (const personId of needed)
        await tx.insert(called).values({ blockId, personId, source: "score" });
    }
    if (call.state !== "published") continue;
    await tx.insert(roomBookings).values({ roomId: call.room, startsAt, endsAt, callId });
    if (call.pianist) {
      const [row] = await tx
        .select({ userId: people.userId })
        .from(people)
        .where(eq(people.id, call.pianist));
      await tx.insert(pianistSessions).values({
        productionId,
        personId: call.pianist,
        bookeeId: row?.userId ?? call.pianist,
        callId,
        startsAt,
        endsAt,
      });
    }
  }
  const away = weekday(6, 0);
  await tx.insert(conflicts).values({
    personId: who.teodor,
    startsAt: at(away, "13:00"),
    endsAt: at(away, "15:30"),
    localFrom: away,
    localTo: away,
    timeFrom: "13:00",
    timeTo: "15:30",
    zone: ZONE,
    reason: "Class until 15:30",
  });
  return productionId;
}
