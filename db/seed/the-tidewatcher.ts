import { addMinutes } from "date-fns";
import { eq, inArray } from "drizzle-orm";
import { createHash, randomBytes } from "node:crypto";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  attendances,
  auditionDays,
  auditionRooms,
  conflicts,
  dayLinks,
  people,
  pianistSessions,
  productions,
  ranges,
  roomBookings,
  seasons,
  signUps,
  slotAssignments,
  slots,
} from "@/db/schema";
import { buildSlots } from "@/lib/schedule/build-slots";
import type { Companies } from "./cast-of-the-demo";
import { at, dayFromToday, give, joinCompany, weekday, ZONE } from "./context";
import { inventedEmail, inventedName, steady } from "./names";
import { addRoles, addTypedNumber } from "./score-rows";
import type { TypedNumber } from "./score-rows";
import { inventedRange, VOICE_KINDS } from "./voices";

const NUMBERS: TypedNumber[] = [
  {
    label: "1",
    title: "Low Water",
    key: "d",
    fifths: -1,
    seconds: 200,
    bars: 92,
    tempo: 84,
    lines: { Maren: [58, 76], Ensemble: [50, 74] },
  },
  {
    label: "2",
    title: "Tide Table",
    key: "G",
    fifths: 1,
    seconds: 245,
    bars: 118,
    tempo: 112,
    lines: { Maren: [59, 76], "Harbour Master": [43, 60], Ensemble: [48, 74] },
  },
  {
    label: "3",
    title: "A Letter from Ansel",
    key: "B♭",
    fifths: -2,
    seconds: 160,
    bars: 64,
    tempo: 72,
    lines: { Ansel: [48, 67] },
  },
  {
    label: "4",
    title: "What the Gulls Know",
    key: "F",
    fifths: -1,
    seconds: 175,
    bars: 80,
    tempo: 96,
    lines: { Maren: [60, 77], "Old Bet": [53, 71] },
  },
  {
    label: "5",
    title: "The Ness Light",
    key: "G",
    fifths: 1,
    seconds: 225,
    bars: 96,
    tempo: 126,
    lines: { Maren: [62, 81], Ansel: [50, 69] },
  },
  {
    label: "6",
    title: "Harbour Reel",
    key: "A",
    fifths: 3,
    seconds: 270,
    bars: 160,
    tempo: 138,
    lines: { Ansel: [49, 68], "Harbour Master": [43, 65], Pip: [60, 76], Ensemble: [48, 76] },
  },
  {
    label: "7",
    title: "Bet’s Ledger",
    key: "E♭",
    fifths: -3,
    seconds: 170,
    bars: 74,
    tempo: 92,
    lines: { "Old Bet": [53, 74], "Harbour Master": [43, 62] },
  },
  {
    label: "8",
    title: "Lamps Out",
    key: "D",
    fifths: 2,
    seconds: 215,
    bars: 88,
    tempo: 66,
    lines: { Maren: [58, 79], "Old Bet": [54, 73], Pip: [62, 76], Ensemble: [47, 74] },
  },
];

const SONGS = [
  "The Long Day Closes",
  "Fairy Lullaby",
  "The Lost Chord",
  "Aloha Oe",
  "Havanaise",
  "Sailing at Dawn",
  "Ständchen",
];

/**
 * In auditions: a day of auditions today (so that the monitor's link works), another next week with time to answer.
 * Returns the production and the secret of the monitor's link.
 */
export async function seedTidewatcher(
  tx: Tx,
  companies: Companies,
): Promise<{ productionId: string; doorSecret: string }> {
  const companyId = companies.lantern;
  const seasonId = newId();
  await tx.insert(seasons).values({
    id: seasonId,
    companyId,
    title: "This season",
    startsOn: dayFromToday(-60),
    endsOn: dayFromToday(200),
  });
  const productionId = newId();
  await tx.insert(productions).values({
    id: productionId,
    companyId,
    seasonId,
    title: "The Tidewatcher",
    stage: "auditions",
    opensOn: dayFromToday(110),
    closesOn: dayFromToday(120),
  });
  const who = companies.atLantern;
  await give(tx, companyId, who.md, "music_director", productionId);
  await give(tx, companyId, who.assistant, "assistant_md", productionId);
  await give(tx, companyId, who.stageManager, "stage_manager", productionId);
  await give(tx, companyId, who.director, "director", productionId);
  await give(tx, companyId, who.hanne, "accompanist", productionId);
  await give(tx, companyId, who.osric, "accompanist", productionId);

  const roleIds = await addRoles(tx, productionId, [
    ["Maren", "principal", 1, 1],
    ["Old Bet", "principal", 1, 1],
    ["Ansel", "principal", 1, 1],
    ["Harbour Master", "supporting", 1, 1],
    ["Pip", "supporting"],
    ["Ensemble", "ensemble", 14],
  ]);
  for (const [index, number] of NUMBERS.entries())
    await addTypedNumber(tx, productionId, index + 1, number, roleIds);

  const today = await addDay(tx, companies, productionId, dayFromToday(0));
  const nextWeek = await addDay(tx, companies, productionId, weekday(6, 1));
  const singers = await addSingers(tx, companies, productionId);
  await place(tx, today, singers.slice(0, 38));
  await place(tx, nextWeek, singers.slice(38, 50));
  await heardSoFar(tx, today, singers.slice(0, 38));
  await invite(tx, singers[38], singers[39]);

  const doorSecret = randomBytes(32).toString("base64url");
  await tx.insert(dayLinks).values({
    dayId: today.dayId,
    tokenHash: createHash("sha256").update(doorSecret).digest("hex"),
  });
  return { productionId, doorSecret };
}

type Day = { dayId: string; free: { id: string; startsAt: Date }[] };

async function addDay(
  tx: Tx,
  companies: Companies,
  productionId: string,
  localDate: string,
): Promise<Day> {
  const dayId = newId();
  await tx.insert(auditionDays).values({
    id: dayId,
    productionId,
    localDate,
    zone: ZONE,
    slotMinutes: 8,
    restAfterMinutes: 80,
    restMinutes: 10,
    lunchMinutes: 60,
    lunchFrom: "12:30",
    lunchTo: "14:00",
  });
  const free: Day["free"] = [];
  for (const [roomId, opens, pianist] of [
    [companies.rooms.one, "10:00", "hanne"],
    [companies.rooms.two, "10:15", "osric"],
  ] as const) {
    const auditionRoomId = newId();
    const opensAt = at(localDate, opens);
    const closesAt = at(localDate, "16:00");
    await tx.insert(auditionRooms).values({ id: auditionRoomId, dayId, roomId, opensAt, closesAt });
    await tx
      .insert(roomBookings)
      .values({ roomId, startsAt: opensAt, endsAt: closesAt, auditionRoomId });
    const plan = buildSlots({
      opens: opensAt,
      closes: closesAt,
      slotMinutes: 8,
      rest: { afterMinutes: 80, restMinutes: 10 },
      lunch: { minutes: 60, windowFrom: at(localDate, "12:30"), windowTo: at(localDate, "14:00") },
    });
    if (!plan.ok) throw new Error(plan.message);
    const made = plan.items.map((item) => ({
      id: newId(),
      auditionRoomId,
      kind: item.kind,
      startsAt: item.from,
      endsAt: item.to,
    }));
    await tx.insert(slots).values(made);
    free.push(...made.filter((slot) => slot.kind === "slot"));
    // The second room has no pianist after lunch yet: something the page should point out.
    const lunch = plan.items.find((item) => item.kind === "lunch");
    const personId = companies.atLantern[pianist];
    const bookeeId = await loginOf(tx, personId);
    await tx.insert(pianistSessions).values({
      productionId,
      personId,
      bookeeId,
      auditionRoomId,
      startsAt: opensAt,
      endsAt: lunch?.from ?? closesAt,
      state: "confirmed",
    });
    if (pianist === "hanne" && lunch) {
      await tx.insert(pianistSessions).values({
        productionId,
        personId,
        bookeeId,
        auditionRoomId,
        startsAt: lunch.to,
        endsAt: closesAt,
        state: "confirmed",
      });
    }
  }
  return { dayId, free: free.sort((a, b) => a.startsAt.getTime() - b.startsAt.getTime()) };
}

async function loginOf(tx: Tx, personId: string): Promise<string> {
  const [row] = await tx
    .select({ userId: people.userId })
    .from(people)
    .where(eq(people.id, personId));
  return row?.userId ?? personId;
}

async function addSingers(tx: Tx, companies: Companies, productionId: string): Promise<string[]> {
  const made: string[] = [];
  const first = [companies.atLantern.wren, companies.atLantern.imke];
  for (let index = 0; index < 55; index += 1) {
    const demo = index >= 38 && index < 40 ? first[index - 38] : undefined;
    const name = inventedName(index);
    const personId =
      demo ??
      (await joinCompany(
        tx,
        companies.lantern,
        { userId: null, name, email: inventedEmail(name) },
        { minor: index === 21 },
      ));
    await give(tx, companies.lantern, personId, "actor", productionId);
    const signUpId = newId();
    const late = index >= 52;
    await tx.insert(signUps).values({
      id: signUpId,
      productionId,
      personId,
      place: index + 1,
      state: index < 38 ? "confirmed" : "listed",
      song: SONGS[index % SONGS.length] ?? null,
      bars: index % 3 === 0 ? 16 : 32,
      asksFor:
        ["Maren", "Old Bet", "Ansel", "Harbour Master", "Pip", "Ensemble"][index % 6] ?? null,
      notBefore: late ? "15:45" : null,
    });
    if (demo === undefined) {
      const voice = VOICE_KINDS[Math.floor(steady(index + 3) * VOICE_KINDS.length)] ?? "mezzo";
      await tx.insert(ranges).values({ personId, kind: "claimed", ...inventedRange(voice, index) });
    }
    if (index % 9 === 4) {
      const day = weekday((index % 5) + 1, 2);
      await tx.insert(conflicts).values({
        personId,
        startsAt: at(day, "17:00"),
        endsAt: at(day, "20:30"),
        localFrom: day,
        localTo: day,
        timeFrom: "17:00",
        timeTo: "20:30",
        zone: ZONE,
        reason: "Evening class",
      });
    }
    made.push(signUpId);
  }
  return made;
}

async function place(tx: Tx, day: Day, signUpIds: string[]): Promise<void> {
  for (const [index, signUpId] of signUpIds.entries()) {
    const slot = day.free[index];
    if (slot)
      await tx.insert(slotAssignments).values({ slotId: slot.id, signUpId, dayId: day.dayId });
  }
}

/** What the door has written by now: who was heard, who is inside, and that the next ones are here. */
async function heardSoFar(tx: Tx, day: Day, signUpIds: string[]): Promise<void> {
  const now = new Date();
  for (const [index, signUpId] of signUpIds.entries()) {
    const startsAt = day.free[index]?.startsAt;
    if (!startsAt || startsAt > addMinutes(now, 20)) continue;
    const ends = addMinutes(startsAt, 7);
    const arrived = addMinutes(startsAt, -15);
    await tx.insert(attendances).values({
      dayId: day.dayId,
      signUpId,
      hereAt: arrived < now ? arrived : now,
      inAt: startsAt <= now ? startsAt : null,
      outAt: ends <= now ? ends : null,
    });
  }
}

async function invite(tx: Tx, ...signUpIds: (string | undefined)[]): Promise<void> {
  const ids = signUpIds.filter((id) => id !== undefined);
  await tx
    .update(signUps)
    .set({ state: "invited", invitedAt: new Date() })
    .where(inArray(signUps.id, ids));
}
