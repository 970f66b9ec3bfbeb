import { MUSIC, PLANNERS, TABLE } from "../personas";
import type { Persona } from "../personas";
import { SCORE_XML } from "../rich-world";
import type { RichWorld } from "../rich-world";
import { reads, takesFile } from "./types";
import type { Door, Doors } from "./types";

const SCORE = "app/(season)/productions/[productionId]/score/actions.ts#";
const CALLBACKS = "app/(season)/productions/[productionId]/callbacks/actions.ts#";
const CASTING = "app/(season)/productions/[productionId]/casting/actions.ts#";
const HEARS: Persona[] = [...MUSIC, ...TABLE];

const inProduction = (w: RichWorld) => ({ productionId: w.productionId });
const music = (extra: (w: RichWorld) => object): Door => ({
  may: MUSIC,
  input: (w) => ({ productionId: w.productionId, ...extra(w) }),
});
const number = {
  label: "9",
  title: "Lamps Out",
  key: "D",
  keyFifths: "",
  metre: "4/4",
  tempo: "96",
  bars: "88",
  length: "3:35",
};
const role = { name: "Pip", kind: "supporting", needed: "1", covers: "0", about: "" };

/** The score, callbacks and casting of a production, and starting one. */
export const PRODUCTION: Doors = {
  // Whoever is signed in may begin a company of their own.
  "app/(season)/actions.ts#createCompany": {
    may: [
      "md",
      "assistant",
      "stageManager",
      "director",
      "choreographer",
      "producer",
      "accompanist",
      "actor",
      "otherActor",
      "admin",
      "siblingMd",
      "outsiderMd",
      "outsiderAdmin",
      "stranger",
    ],
    input: () => ({ name: "Quayside Players", zone: "Europe/London", paper: "A4" }),
  },
  "app/(season)/actions.ts#createProduction": {
    may: ["admin"],
    input: (w) => ({ companyId: w.companyId, title: "Low Water", opensOn: "", closesOn: "" }),
  },
  "app/(season)/actions.ts#changeProduction": music(() => ({
    version: 1,
    title: "The Tidewatcher",
    stage: "casting",
    opensOn: "",
    closesOn: "",
  })),

  [`${SCORE}addNumber`]: music(() => number),
  [`${SCORE}changeNumber`]: music((w) => ({ numberId: w.numberId, version: 1, ...number })),
  [`${SCORE}removeNumber`]: music((w) => ({ numberId: w.otherNumberId })),
  [`${SCORE}restoreNumber`]: music((w) => ({ numberId: w.otherNumberId })),
  [`${SCORE}moveNumber`]: music((w) => ({ numberId: w.otherNumberId, direction: "up" })),
  [`${SCORE}addRole`]: music(() => role),
  [`${SCORE}changeRole`]: music((w) => ({ roleId: w.otherRoleId, version: 1, ...role })),
  [`${SCORE}removeRole`]: music((w) => ({ roleId: w.otherRoleId })),
  [`${SCORE}restoreRole`]: music((w) => ({ roleId: w.otherRoleId })),
  [`${SCORE}writeLine`]: music((w) => ({
    roleId: w.otherRoleId,
    numberId: w.numberId,
    low: "F3",
    high: "D5",
  })),
  [`${SCORE}removeLine`]: music((w) => ({ lineId: w.lineId })),
  [`${SCORE}shiftPart`]: music((w) => ({ scorePartId: w.scorePartId, octaveShift: -1 })),
  [`${SCORE}confirmReading`]: music((w) => ({
    scoreId: w.scoreId,
    numberId: "",
    ...number,
    parts: [
      {
        scorePartId: w.scorePartId,
        to: "new",
        name: "The Voice",
        kind: "principal",
        octaveShift: 0,
      },
    ],
  })),
  "app/api/productions/[productionId]/score/route.ts#POST": takesFile(
    MUSIC,
    "/score",
    () => new File([SCORE_XML], "low-water.musicxml"),
    inProduction,
  ),

  // A round that is not published yet has to be finished first; the rich world's is published.
  [`${CALLBACKS}startRound`]: music(() => ({ title: "Second round" })),
  [`${CALLBACKS}changeRound`]: music((w) => ({
    roundId: w.roundId,
    version: 1,
    localDate: "2027-03-25",
    from: "18:00",
    to: "20:00",
    roomId: "",
    material: "",
  })),
  [`${CALLBACKS}setMark`]: {
    may: HEARS,
    input: (w) => ({
      ...inProduction(w),
      roundId: w.roundId,
      personId: w.people.otherActor.personId,
      roleId: w.otherRoleId,
      on: true,
    }),
  },
  [`${CALLBACKS}publishRound`]: music((w) => ({ roundId: w.roundId, version: 1 })),
  "app/api/productions/[productionId]/callbacks/route.ts#GET": reads(
    [...HEARS, "stageManager"],
    "/callbacks",
    inProduction,
  ),

  [`${CASTING}choose`]: music((w) => ({
    roleId: w.otherRoleId,
    personId: w.people.otherActor.personId,
    state: "cast",
    kind: "principal",
    version: 0,
  })),
  [`${CASTING}publishCast`]: music(() => ({ published: true })),
  [`${CASTING}computeFit`]: {
    may: HEARS,
    input: (w) => ({ ...inProduction(w), roleId: w.roleId, personId: w.people.actor.personId }),
  },
  "app/api/productions/[productionId]/casting/route.ts#GET": reads(HEARS, "/casting", inProduction),
};

const AUDITIONS = "app/(season)/productions/[productionId]/auditions/actions.ts#";
const planned = (extra: (w: RichWorld) => object): Door => ({
  may: PLANNERS,
  input: (w) => ({ productionId: w.productionId, ...extra(w) }),
});
const day = (w: RichWorld) => ({
  localDate: "2027-03-21",
  slotMinutes: "8",
  restAfterMinutes: "80",
  restMinutes: "10",
  lunchMinutes: "0",
  lunchFrom: "",
  lunchTo: "",
  hold: false,
  rooms: [{ roomId: w.secondRoomId, opens: "10:00", closes: "12:00" }],
});
const singer = {
  name: "Ivo Penhale",
  email: "ivo.penhale@singers.example",
  phone: "",
  pronouns: "",
  minor: false,
  asksFor: "",
  song: "",
  bars: "",
  low: "",
  high: "",
  notBefore: "",
  notAfter: "",
};
const CSV = "Name,E-mail\nIvo Penhale,ivo.penhale@singers.example\n";

/** Audition days, sign-ups, slots, pianists, the door. */
export const AUDITION: Doors = {
  [`${AUDITIONS}createDay`]: planned(day),
  [`${AUDITIONS}changeDay`]: planned((w) => ({
    ...day(w),
    dayId: w.dayId,
    version: 1,
    localDate: "2027-03-20",
    rooms: [{ roomId: w.roomId, opens: "10:00", closes: "13:00" }],
    mayLose: [],
  })),
  [`${AUDITIONS}removeDay`]: planned((w) => ({ dayId: w.dayId })),
  [`${AUDITIONS}addSinger`]: planned(() => singer),
  [`${AUDITIONS}importSingers`]: planned(() => ({ rows: [singer] })),
  [`${AUDITIONS}changeSignUp`]: planned((w) => ({
    signUpId: w.signUpId,
    version: 1,
    song: "Low Water",
    bars: "16",
    asksFor: "",
    notBefore: "",
    notAfter: "",
  })),
  [`${AUDITIONS}withdrawSignUp`]: planned((w) => ({ signUpId: w.signUpId })),
  [`${AUDITIONS}relistSignUp`]: planned((w) => ({ signUpId: w.signUpId })),
  [`${AUDITIONS}placeSinger`]: planned((w) => ({
    signUpId: w.signUpId,
    slotId: w.freeSlotId,
    seenIn: w.slotId,
  })),
  [`${AUDITIONS}swapSingers`]: planned((w) => ({
    first: { signUpId: w.signUpId, slotId: w.slotId },
    second: { signUpId: w.otherSignUpId, slotId: w.otherSlotId },
  })),
  [`${AUDITIONS}takeOut`]: planned((w) => ({ signUpId: w.signUpId })),
  [`${AUDITIONS}proposeFill`]: planned((w) => ({ dayId: w.dayId })),
  [`${AUDITIONS}acceptFill`]: planned((w) => ({
    dayId: w.dayId,
    placements: [{ signUpId: w.signUpId, slotId: w.freeSlotId }],
  })),
  [`${AUDITIONS}assignPianist`]: {
    may: MUSIC,
    input: (w) => ({
      ...inProduction(w),
      auditionRoomId: w.auditionRoomId,
      personId: w.people.accompanist.personId,
      from: "11:00",
      to: "12:00",
    }),
  },
  [`${AUDITIONS}removePianist`]: {
    may: MUSIC,
    input: (w) => ({ ...inProduction(w), sessionId: w.auditionSessionId }),
  },
  [`${AUDITIONS}previewInvitations`]: planned((w) => ({ dayId: w.dayId, signUpIds: null })),
  [`${AUDITIONS}inviteSingers`]: planned((w) => ({ dayId: w.dayId, signUpIds: null })),
  [`${AUDITIONS}makeDoorLink`]: planned((w) => ({ dayId: w.dayId })),
  [`${AUDITIONS}revokeDoorLink`]: planned((w) => ({ dayId: w.dayId })),
  [`${AUDITIONS}hearRange`]: {
    may: HEARS,
    input: (w) => ({
      ...inProduction(w),
      personId: w.people.actor.personId,
      low: 55,
      high: 79,
      comfortableLow: null,
      comfortableHigh: null,
    }),
  },
  "app/api/productions/[productionId]/auditions/[dayId]/route.ts#GET": reads(
    [...PLANNERS, ...TABLE],
    "/auditions",
    (w) => ({ productionId: w.productionId, dayId: w.dayId }),
  ),
  "app/api/productions/[productionId]/auditions/import/route.ts#POST": takesFile(
    PLANNERS,
    "/import",
    () => new File([CSV], "singers.csv"),
    inProduction,
  ),
  "app/api/productions/[productionId]/auditions/template/route.ts#GET": reads(
    PLANNERS,
    "/template",
    inProduction,
  ),
  // The monitor's link opens on its own day only, and this one's day is another: whoever asks, it says so without a name.
  "app/(room)/door/[token]/actions.ts#actAtDoor": {
    may: "anyone",
    input: (w) => ({ token: w.doorSecret, signUpId: w.signUpId, act: "here" }),
  },
  "app/api/door/[token]/route.ts#GET": reads("anyone", "/door", (w) => ({ token: w.doorSecret })),
};
