import { addDays } from "date-fns";
import type { Tx } from "@/db/client";
import { newId } from "@/db/columns";
import {
  callbackInvitations,
  callbackMarks,
  callbackRounds,
  choices,
  productions,
  ranges,
  seasons,
  signUps,
} from "@/db/schema";
import type { CallbackSnapshot } from "@/db/schema/callbacks";
import type { Companies } from "./cast-of-the-demo";
import { at, dayFromToday, give, joinCompany, weekday, ZONE } from "./context";
import { inventedEmail, inventedName } from "./names";
import { addReadNumber, addRoles } from "./score-rows";
import { inventedRange } from "./voices";
import type { VoiceKind } from "./voices";

/** Singer, voice, and the roles they are called back for. */
const CALLED_BACK: [voice: VoiceKind, roles: string[]][] = [
  ["soprano", ["The Candle-maker", "First Voice"]],
  ["soprano", ["The Candle-maker", "The Pedlar’s Daughter"]],
  ["mezzo", ["The Pedlar’s Daughter", "Second Voice"]],
  ["tenor", ["The Ferryman", "Third Voice"]],
  ["tenor", ["The Ferryman"]],
  ["baritone", ["The Pedlar", "Fourth Voice"]],
  ["bass", ["The Pedlar", "Fourth Voice"]],
  ["alto", ["Second Voice"]],
  ["baritone", ["The Ferryman", "The Pedlar"]],
];

/** In casting: its numbers are read from public-domain scores; callbacks are published and half answered. */
export async function seedCandlemas(tx: Tx, companies: Companies): Promise<string> {
  const companyId = companies.fenmoor;
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
    title: "A Fair at Candlemas",
    stage: "casting",
    opensOn: dayFromToday(80),
    closesOn: dayFromToday(86),
  });
  const who = companies.atFenmoor;
  await give(tx, companyId, who.md, "music_director", productionId);
  await give(tx, companyId, who.director, "director", productionId);
  await give(tx, companyId, who.assistant, "stage_manager", productionId);
  await give(tx, companyId, who.osric, "accompanist", productionId);

  const roleIds = await addRoles(tx, productionId, [
    ["The Candle-maker", "principal", 1, 1],
    ["The Pedlar’s Daughter", "principal", 1, 1],
    ["The Ferryman", "principal", 1, 1],
    ["The Pedlar", "supporting"],
    ["First Voice", "ensemble", 4],
    ["Second Voice", "ensemble", 4],
    ["Third Voice", "ensemble", 4],
    ["Fourth Voice", "ensemble", 4],
  ]);
  const production = { id: productionId, companyId };
  await addReadNumber(
    tx,
    production,
    1,
    "1",
    "stanford-sailing-at-dawn.mxl",
    {
      Solo: ["The Ferryman", "8vb"],
      Soprano: "First Voice",
      Alto: "Second Voice",
      Tenor: "Third Voice",
      Bass: "Fourth Voice",
    },
    roleIds,
  );
  await addReadNumber(
    tx,
    production,
    2,
    "2",
    "beach-fairy-lullaby.mxl",
    { Voice: "The Candle-maker" },
    roleIds,
  );
  await addReadNumber(
    tx,
    production,
    3,
    "3",
    "liliuokalani-aloha-oe.mxl",
    { Voice: "The Pedlar’s Daughter", Women: "Second Voice", Men: "Fourth Voice" },
    roleIds,
  );
  await addReadNumber(
    tx,
    production,
    4,
    "4",
    "sullivan-the-lost-chord.mxl",
    { Voice: "The Candle-maker" },
    roleIds,
  );
  await addReadNumber(
    tx,
    production,
    5,
    "5",
    "arne-rule-britannia.mxl",
    { Soprano: "First Voice", Men: "The Pedlar" },
    roleIds,
  );

  const day = weekday(6, 0);
  const roundId = newId();
  const startsAt = at(day, "13:00");
  const endsAt = at(day, "17:00");
  const published = addDays(new Date(), -1);
  await tx.insert(callbackRounds).values({
    id: roundId,
    productionId,
    title: "Callbacks",
    startsAt,
    endsAt,
    zone: ZONE,
    roomId: companies.rooms.fenmoorStudio,
    material:
      "Your role’s number from the score, from memory if you can; sides will be handed out at the door.",
    issue: 1,
    publishedAt: published,
  });
  for (const [index, [voice, wanted]] of CALLED_BACK.entries()) {
    const name = inventedName(60 + index);
    const personId =
      index === 0
        ? who.wren
        : await joinCompany(tx, companyId, { userId: null, name, email: inventedEmail(name) });
    await give(tx, companyId, personId, "actor", productionId);
    await tx.insert(signUps).values({
      productionId,
      personId,
      place: index + 1,
      state: "confirmed",
      song: "Fairy Lullaby",
      bars: 32,
      asksFor: wanted[0] ?? null,
    });
    const range = inventedRange(voice, 200 + index);
    await tx.insert(ranges).values({ personId, kind: "claimed", ...range });
    if (index % 2 === 0)
      await tx.insert(ranges).values({
        personId,
        kind: "heard",
        ...range,
        low: range.low + 1,
        high: range.high - 1,
        productionId,
      });
    for (const role of wanted) {
      const roleId = roleIds[role];
      if (roleId) await tx.insert(callbackMarks).values({ roundId, personId, roleId });
    }
    const snapshot: CallbackSnapshot = {
      round: "Callbacks",
      roles: wanted,
      startsAt: startsAt.toISOString(),
      endsAt: endsAt.toISOString(),
      zone: ZONE,
      room: "Studio 3, Fenmoor Conservatory",
      material:
        "Your role’s number from the score, from memory if you can; sides will be handed out at the door.",
    };
    const answered = index > 0 && index % 3 !== 0;
    await tx.insert(callbackInvitations).values({
      roundId,
      personId,
      issue: 1,
      snapshot,
      publishedAt: published,
      answer: answered ? (index === 4 ? "no" : "yes") : null,
      answeredAt: answered ? new Date() : null,
    });
    const considered = roleIds[wanted[0] ?? ""];
    if (considered && (index === 1 || index === 3))
      await tx
        .insert(choices)
        .values({ productionId, roleId: considered, personId, state: "considered" });
  }
  return productionId;
}
