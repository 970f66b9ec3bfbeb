import path from "node:path";
import { expect } from "vitest";
import { spoken } from "../helpers/dates";
import { PEOPLE } from "../helpers/demo-season";
import { AUDITION_DATE, NUMBERS, TITLE } from "../helpers/job";
import type { Job } from "../helpers/job";
import { octaveDown, partsOf } from "../helpers/reference";
import { DayPage, ImportPage, makeDay } from "../pages/auditions";
import { invite, makeProduction } from "../pages/productions";
import { ScorePage } from "../pages/score";
import { signInWithPassword } from "../pages/sign-in";
import { told, visit } from "../pages/visit";

const ROOT = path.resolve(import.meta.dirname, "../../..");
const SCORE = path.join(ROOT, "db/seed/music/sullivan-the-long-day-closes.mxl");
const SHEETS = path.join(ROOT, "tests/fixtures/sheets");

/** The music director makes a production. */
export async function makeTheProduction(job: Job): Promise<void> {
  const { stage, made } = job;
  const md = await stage.desk("Runa Oake");
  job.md = md;
  await signInWithPassword(md, PEOPLE.md);
  made.production = await makeProduction(md, {
    title: TITLE,
    company: "Lantern Street Theatre",
  });
  await md.getByRole("heading", { name: "No numbers and no roles yet" }).waitFor();
}

/** A score is read: its parts become roles, with the ranges of the reference. */
export async function readTheScore({ md, made }: Job): Promise<void> {
  const score = new ScorePage(md);
  const reading = await score.read(SCORE);
  made.reading = new URL(md.url()).pathname;
  const parts = partsOf("sullivan-the-long-day-closes");
  expect(parts).toHaveLength(4);
  for (const { name, low, high, tessitura } of parts) {
    expect(await reading.range(name)).toBe(`${low} to ${high}, mostly ${tessitura}.`);
    expect(await reading.drawing(name)).toBe(`${low} to ${high}, mostly ${tessitura}`);
    expect(await reading.becomes(name)).toBe("a new role");
    // Only the highest part is written in a treble clef that means an octave lower.
    expect(await reading.looksHigh(name)).toBe(name === parts[0]!.name);
  }
  await reading.takeDown(parts[0]!.name);
  expect(await reading.range(parts[0]!.name)).toContain("G♯3 to B4");
  expect((await reading.changes()).join()).toContain("Adds 4 lines read from the score.");
  await reading.putIn();
  expect(await score.roles()).toEqual(parts.map(({ name }) => name));
  for (const [index, { name, low, high }] of parts.entries()) {
    const shift = index === 0 ? octaveDown : (pitch: string) => pitch;
    await score
      .line(name, NUMBERS[0])
      .and(md.getByRole("link", { name: `${shift(low)} to ${shift(high)}` }))
      .waitFor();
  }
}

/** A role, two numbers and two lines are typed in. */
export async function typeWhatIsMissing({ md }: Job): Promise<void> {
  const score = new ScorePage(md);
  await score.addRole("The Ferryman");
  await score.addNumber("2", NUMBERS[1], "2:40");
  await score.addNumber("3", NUMBERS[2], "3:10");
  await score.typeLine("The Ferryman", NUMBERS[1], "C3", "E4");
  await score.typeLine("2nd Bass", NUMBERS[2], "F2", "C4");
  await md.getByText("3 numbers, 5 roles").first().waitFor();
}

/** People are invited into their positions. */
export async function inviteTheTeam({ md, made }: Job): Promise<void> {
  await visit(md, `${made.production}/people`);
  for (const [name, address, position] of [
    ["Ilse Varga", PEOPLE.assistant, "Assistant music director"],
    ["Bram Teller", PEOPLE.stageManager, "Stage manager"],
    ["Odile Castellane", PEOPLE.director, "Director"],
    ["Hanne Briscoe", PEOPLE.hanne, "Accompanist"],
    ["Osric Dlamini", PEOPLE.osric, "Accompanist"],
  ] as const)
    await invite(md, { name, address, position });
}

/** An audition day has two rooms, slots of 8 minutes, lunch and rests. */
export async function makeTheDay({ md, made }: Job): Promise<void> {
  const rooms = ["Room 1", "Room 2"].map((name) => ({ name, opens: "10:00", closes: "16:00" }));
  made.day = await makeDay(md, made.production, { date: AUDITION_DATE, rooms, slotMinutes: "8" });
  const day = new DayPage(md);
  await day.open(made.day);
  await md.getByRole("heading", { level: 1, name: spoken(AUDITION_DATE) }).waitFor();
  for (const { name } of rooms) {
    const starts = (await day.slots(name)).map(minutesOf);
    const gaps = starts.slice(1).map((start, index) => start - starts[index]!);
    // A slot, or a slot and the pianist's ten minutes, or a slot and the hour of lunch.
    expect(new Set(gaps)).toEqual(new Set([8, 18, 68]));
    expect(gaps.filter((gap) => gap === 68)).toHaveLength(1);
    const lunch = starts[gaps.indexOf(68)]! + 8;
    expect(lunch).toBeGreaterThanOrEqual(12.5 * 60);
    expect(lunch + 60).toBeLessThanOrEqual(14 * 60);
    // Nobody plays for longer than the 80 minutes asked for: ten slots.
    const stretches = gaps.join(" ").split(/18|68/);
    for (const stretch of stretches) expect(stretch.trim().split(" ").length).toBeLessThan(10);
    expect(await day.rests(name)).toEqual([
      "Pianist rests 10 min",
      "Lunch",
      "Pianist rests 10 min",
    ]);
  }
}

/** Forty singers come from a spreadsheet; three rows say what is wrong with them. */
export async function importSingers({ md, made }: Job): Promise<void> {
  const sheet = new ImportPage(md);
  await sheet.choose(made.production, path.join(SHEETS, "singers.csv"));
  const fromText = await sheet.preview();
  await sheet.choose(made.production, path.join(SHEETS, "singers.xlsx"));
  expect(await sheet.preview()).toEqual(fromText);
  expect(fromText).toHaveLength(43);
  // What is wrong stands in the file's own description: lines 22 to 24 (tests/fixtures/sheets/README.md).
  expect(await sheet.leftOut()).toEqual({
    "22": [expect.stringContaining("name is missing"), expect.stringContaining("not an e-mail")],
    "23": [expect.stringMatching(/lowest note, D4, is above the highest, E2/)],
    "24": [
      expect.stringContaining("“H9” is not a note"),
      expect.stringContaining("“a few” is not a number of bars"),
      expect.stringContaining("in line 2 already"),
    ],
  });
  await sheet.signUp();
  await told(md, /^40 singers signed up/);
}

/** Everyone is placed within the times they asked for. */
export async function placeEveryone({ md, made }: Job): Promise<void> {
  const day = new DayPage(md);
  await day.open(made.day);
  await day.placeEveryone();
  await md.getByText("40 placed").waitFor();
  const slots = [...(await day.slots("Room 1")), ...(await day.slots("Room 2"))];
  expect(slots.filter((slot) => slot.endsWith(", listed"))).toHaveLength(40);
  expect(slots.filter((slot) => slot.includes("asked for"))).toEqual([]);
}

/** Singers are moved by pointer and by keyboard, and two change places. */
export async function moveSingers({ md, made }: Job): Promise<void> {
  const day = new DayPage(md);
  const [byHand, byKeys, one, other] = [
    "Bashir O’Dowd",
    "Carys Mbeki",
    "Dagný Ferreira",
    "Freya Nakashima",
  ] as const;
  expect(await day.isFree("15:52", "Room 2")).toBe(true);
  await day.drag(byHand, "15:52", "Room 2");
  const column = (await day.placeOf(byKeys)).slice(6);
  expect(await day.isFree("15:44", column)).toBe(true);
  await day.moveByKeyboard(byKeys, ["End", "ArrowUp"]);
  const places = [await day.placeOf(one), await day.placeOf(other)];
  await day.swap(one, other);
  const now = { [byHand]: "15:52 Room 2", [byKeys]: `15:44 ${column}` };
  await day.open(made.day);
  expect(await day.placeOf(byHand)).toBe(now[byHand]);
  expect(await day.placeOf(byKeys)).toBe(now[byKeys]);
  expect([await day.placeOf(other), await day.placeOf(one)]).toEqual(places);
}

/** Two pianists are assigned, and one who is taken is refused with the reason. */
export async function assignPianists({ md }: Job): Promise<void> {
  const day = new DayPage(md);
  await day.assignPianist("Hanne Briscoe", "Room 1", "10:00", "16:00");
  await day.askForPianist("Hanne Briscoe", "Room 2", "11:30", "13:00");
  expect(await day.refused(/Hanne Briscoe plays/)).toMatch(
    new RegExp(`${TITLE} in Room 1, 10:00–16:00. Choose another pianist, or times outside that`),
  );
  await day.assignPianist("Osric Dlamini", "Room 2", "10:00", "16:00");
  await md.getByText("no pianist for part of the day").waitFor({ state: "detached" });
}

/** Minutes after midnight at which a slot starts, from its label "10:08 Room 1, free". */
function minutesOf(slot: string): number {
  const [hours = 0, minutes = 0] = slot.slice(0, 5).split(":").map(Number);
  return hours * 60 + minutes;
}
