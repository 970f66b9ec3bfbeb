import { db } from "@/db/client";
import { newId } from "@/db/columns";
import * as t from "@/db/schema";
import { hashToken } from "@/lib/auth/hash-token";
import { storeFile } from "@/lib/services/storage/storage";
import { makeWorld } from "./world";

/** The smallest score there is: one part, one bar, one sung note. */
export const SCORE_XML = `<?xml version="1.0"?><score-partwise version="4.0"><part-list><score-part id="P1"><part-name>Voice</part-name></score-part></part-list><part id="P1"><measure number="1"><attributes><divisions>1</divisions><time><beats>4</beats><beat-type>4</beat-type></time></attributes><note><pitch><step>C</step><octave>4</octave></pitch><duration>4</duration><lyric><text>la</text></lyric></note></measure></part></score-partwise>`;

export type RichWorld = Awaited<ReturnType<typeof makeRichWorld>>;

const at = (hour: number, minute = 0, day = 20) => new Date(Date.UTC(2027, 2, day, hour, minute));

/** The world with one of everything in the first production: a score, a day, singers, callbacks, a cast, calls, a sheet. */
export async function makeRichWorld() {
  const world = await makeWorld();
  const { companyId, productionId, people } = world;
  const ids = {
    roleId: newId(),
    otherRoleId: newId(),
    numberId: newId(),
    otherNumberId: newId(),
    lineId: newId(),
    fileId: newId(),
    scoreId: newId(),
    scorePartId: newId(),
    dayId: newId(),
    auditionRoomId: newId(),
    slotId: newId(),
    freeSlotId: newId(),
    otherSlotId: newId(),
    signUpId: newId(),
    otherSignUpId: newId(),
    roundId: newId(),
    invitationId: newId(),
    callId: newId(),
    publishedCallId: newId(),
    blockId: newId(),
    publishedBlockId: newId(),
    conflictId: newId(),
    issueId: newId(),
    positionId: newId(),
    auditionSessionId: newId(),
    accountInvitationId: newId(),
  };
  const doorSecret = `door-${newId()}`;
  const invitationSecret = `invitation-${newId()}`;
  await db.insert(t.roles).values([
    { id: ids.roleId, productionId, name: "Maren", place: 1 },
    { id: ids.otherRoleId, productionId, name: "Old Bet", place: 2 },
  ]);
  const stored = await storeFile(new TextEncoder().encode(SCORE_XML));
  await db.insert(t.files).values({
    id: ids.fileId,
    companyId,
    productionId,
    mediaType: "application/xml",
    name: "low-water.musicxml",
    kind: "score",
    ...stored,
  });
  await db
    .insert(t.scores)
    .values({ id: ids.scoreId, productionId, fileId: ids.fileId, title: "Low Water" });
  await db.insert(t.scoreParts).values({
    id: ids.scorePartId,
    scoreId: ids.scoreId,
    partId: "P1",
    place: 0,
    name: "Voice",
    vocal: true,
    low: 60,
    high: 60,
    lowSpelled: "C4",
    highSpelled: "C4",
    histogram: { "60": 4 },
    warnings: [],
  });
  await db.insert(t.numbers).values([
    { id: ids.numberId, productionId, label: "1", title: "The Ness Light", place: 1, seconds: 180 },
    { id: ids.otherNumberId, productionId, label: "2", title: "Low Water", place: 2, seconds: 120 },
  ]);
  await db.insert(t.vocalLines).values({
    id: ids.lineId,
    roleId: ids.roleId,
    numberId: ids.numberId,
    source: "typed",
    low: 58,
    high: 81,
    lowSpelled: "B♭3",
    highSpelled: "A5",
  });
  await db.insert(t.auditionDays).values({
    id: ids.dayId,
    productionId,
    localDate: "2027-03-20",
    zone: "Europe/London",
    slotMinutes: 8,
  });
  await db.insert(t.auditionRooms).values({
    id: ids.auditionRoomId,
    dayId: ids.dayId,
    roomId: world.roomId,
    opensAt: at(10),
    closesAt: at(12),
  });
  await db.insert(t.roomBookings).values({
    roomId: world.roomId,
    startsAt: at(10),
    endsAt: at(12),
    auditionRoomId: ids.auditionRoomId,
  });
  await db.insert(t.slots).values(
    [ids.slotId, ids.otherSlotId, ids.freeSlotId].map((id, n) => ({
      id,
      auditionRoomId: ids.auditionRoomId,
      kind: "slot" as const,
      startsAt: at(10, n * 8),
      endsAt: at(10, n * 8 + 8),
    })),
  );
  await db.insert(t.signUps).values([
    {
      id: ids.signUpId,
      productionId,
      personId: people.actor.personId,
      place: 1,
      state: "invited",
      song: "Low Water",
      bars: 32,
    },
    {
      id: ids.otherSignUpId,
      productionId,
      personId: people.otherActor.personId,
      place: 2,
      state: "listed",
    },
  ]);
  await db.insert(t.slotAssignments).values([
    { slotId: ids.slotId, signUpId: ids.signUpId, dayId: ids.dayId },
    { slotId: ids.otherSlotId, signUpId: ids.otherSignUpId, dayId: ids.dayId },
  ]);
  await db.insert(t.dayLinks).values({ dayId: ids.dayId, tokenHash: hashToken(doorSecret) });
  await db.insert(t.pianistSessions).values({
    id: ids.auditionSessionId,
    productionId,
    personId: people.accompanist.personId,
    bookeeId: people.accompanist.userId,
    auditionRoomId: ids.auditionRoomId,
    startsAt: at(10),
    endsAt: at(11),
  });
  await db
    .insert(t.ranges)
    .values({ personId: people.actor.personId, kind: "claimed", low: 55, high: 79 });
  await db.insert(t.callbackRounds).values({
    id: ids.roundId,
    productionId,
    title: "Callbacks",
    zone: "Europe/London",
    startsAt: at(18, 0, 23),
    endsAt: at(20, 0, 23),
    issue: 1,
    publishedAt: new Date(),
  });
  await db
    .insert(t.callbackMarks)
    .values({ roundId: ids.roundId, personId: people.actor.personId, roleId: ids.roleId });
  await db.insert(t.callbackInvitations).values({
    id: ids.invitationId,
    roundId: ids.roundId,
    personId: people.actor.personId,
    issue: 1,
    publishedAt: new Date(),
    snapshot: {
      round: "Callbacks",
      roles: ["Maren"],
      startsAt: at(18, 0, 23).toISOString(),
      endsAt: at(20, 0, 23).toISOString(),
      zone: "Europe/London",
      room: null,
      material: null,
    },
  });
  await db
    .insert(t.choices)
    .values({ productionId, roleId: ids.roleId, personId: people.actor.personId, state: "cast" });
  const call = {
    productionId,
    kind: "music" as const,
    localDate: "2027-03-24",
    localTime: "18:30",
    zone: "Europe/London",
    leaderId: people.md.personId,
  };
  await db.insert(t.calls).values([
    {
      id: ids.callId,
      ...call,
      startsAt: at(18, 30, 24),
      endsAt: at(19, 30, 24),
      roomId: world.secondRoomId,
    },
    {
      id: ids.publishedCallId,
      ...call,
      startsAt: at(20, 0, 24),
      endsAt: at(21, 0, 24),
      localTime: "20:00",
      roomId: world.roomId,
      pianistId: people.accompanist.personId,
      state: "published",
    },
  ]);
  await db.insert(t.blocks).values([
    {
      id: ids.blockId,
      callId: ids.callId,
      place: 1,
      kind: "number",
      minutes: 60,
      numberId: ids.numberId,
    },
    {
      id: ids.publishedBlockId,
      callId: ids.publishedCallId,
      place: 1,
      kind: "number",
      minutes: 60,
      numberId: ids.numberId,
    },
  ]);
  await db.insert(t.called).values([
    { blockId: ids.blockId, personId: people.actor.personId, source: "score" },
    { blockId: ids.publishedBlockId, personId: people.actor.personId, source: "score" },
  ]);
  await db.insert(t.roomBookings).values({
    roomId: world.roomId,
    startsAt: at(20, 0, 24),
    endsAt: at(21, 0, 24),
    callId: ids.publishedCallId,
  });
  await db.insert(t.pianistSessions).values({
    productionId,
    personId: people.accompanist.personId,
    bookeeId: people.accompanist.userId,
    callId: ids.publishedCallId,
    startsAt: at(20, 0, 24),
    endsAt: at(21, 0, 24),
  });
  await db.insert(t.conflicts).values({
    id: ids.conflictId,
    personId: people.actor.personId,
    startsAt: at(17, 0, 24),
    endsAt: at(19, 0, 24),
    localFrom: "2027-03-24",
    localTo: "2027-03-24",
    timeFrom: "17:00",
    timeTo: "19:00",
    zone: "Europe/London",
  });
  await db.insert(t.callSheetIssues).values({
    id: ids.issueId,
    productionId,
    localDate: "2027-03-24",
    number: 1,
    issuedAt: new Date(),
    concerns: [people.actor.personId],
    snapshot: {
      sheet: {
        productionTitle: "The Tidewatcher",
        companyName: "Lantern Street Theatre",
        localDate: "2027-03-24",
        zone: "Europe/London",
        issueNumber: 1,
        issuedAt: new Date().toISOString(),
        changed: [],
        blocks: [
          {
            from: "20:00",
            to: "21:00",
            kind: "number",
            numberLabel: "1",
            title: "The Ness Light",
            who: ["Wren Tallis"],
            where: "Room 1",
          },
        ],
        released: [{ who: "Wren Tallis", at: "21:00" }],
        music: ["Runa Oake leads"],
        tomorrow: [],
        away: [],
        notes: [],
      },
      people: {
        [people.actor.personId]: {
          name: "Wren Tallis",
          blockIds: [],
          from: "20:00",
          releasedAt: "21:00",
        },
      },
    },
  });
  // Someone invited as choreographer who has not accepted yet.
  const invited = newId();
  await db
    .insert(t.people)
    .values({ id: invited, companyId, name: "Ansa Kole", email: "ansa.kole@people.example" });
  await db.insert(t.positions).values({
    id: ids.positionId,
    companyId,
    productionId,
    personId: invited,
    kind: "choreographer",
  });
  await db.insert(t.invitations).values({
    id: ids.accountInvitationId,
    positionId: ids.positionId,
    email: "ansa.kole@people.example",
    tokenHash: hashToken(invitationSecret),
    expiresAt: new Date(Date.now() + 86_400_000),
  });
  return { ...world, ...ids, doorSecret, invitationSecret, invitedPersonId: invited };
}
