import { expect } from "vitest";
import { dayOfDemo, spoken } from "../helpers/dates";
import { PEOPLE } from "../helpers/demo-season";
import { AUDITION_DATE, CALL_DATE, NUMBERS, SINGER, TITLE } from "../helpers/job";
import type { Job } from "../helpers/job";
import { readWorkbook } from "../helpers/read-workbook";
import { until } from "../helpers/until";
import { SheetPage } from "../pages/call-sheets";
import { CastingPage } from "../pages/casting";
import { OwnPage } from "../pages/own-page";
import { CallForm, CallPage } from "../pages/rehearsals";
import { sessionsOf } from "../pages/sessions";
import { acceptInvitation, signInByLink } from "../pages/sign-in";
import { visit } from "../pages/visit";

/** The grid says how each singer fits each role, and they are cast. */
export async function castFromTheGrid({ md, made }: Job): Promise<void> {
  const casting = new CastingPage(md);
  await casting.open(made.production);
  expect(await casting.singers()).toEqual([SINGER.name, "Kaito Berglund", "Kalinda Morrow"]);
  // Semitones by hand: 1st Bass G♯2–D4 is three below B2; Kalinda Morrow's claimed E2–D4 holds the whole of 2nd Bass, E2–B3.
  for (const [singer, role, verdict, ranges] of [
    [SINGER.name, "Alto (or 1st Tenor)", "1 short at top", "Role G♯3–B4, singer B2–B♭4"],
    [SINGER.name, "2nd Tenor", "Fits", "Role E3–G♯4, singer B2–B♭4"],
    [SINGER.name, "1st Bass", "3 short below", "Role G♯2–D4, singer B2–B♭4"],
    ["Kaito Berglund", "The Ferryman", "Fits", "Role C3–E4, singer C3–A4"],
    ["Kalinda Morrow", "2nd Bass", "Fits", "Role E2–C4, singer E2–D4"],
  ] as const) {
    const { text, drawing } = await casting.words(singer, role);
    expect(text).toContain(verdict);
    expect(drawing).toContain(verdict);
    expect(drawing).toContain(ranges);
  }
  await casting.cast(SINGER.name, "2nd Tenor");
  await casting.cast("Kaito Berglund", "The Ferryman");
  await casting.cast("Kalinda Morrow", "2nd Bass");
  await md.getByText("3 of 5 roles cast").waitFor();
}

/** A music call shows who is needed, and every clash with what to do. */
export async function makeTheCall({ md, made }: Job): Promise<void> {
  const call = new CallForm(md);
  await call.fill(made.production, {
    date: CALL_DATE,
    starts: "18:30",
    room: "Room 1, Lantern Street",
    leads: "Runa Oake",
    pianist: "Hanne Briscoe",
    numbers: NUMBERS.map((title, index) => `${String(index + 1)} ${title}`),
  });
  expect(await call.calledTo(NUMBERS[0])).toContain(`${SINGER.name}, Kalinda Morrow`);
  expect(await call.calledTo(NUMBERS[0])).toContain("Not cast yet: Alto (or 1st Tenor), 1st Bass");
  expect(await call.calledTo(NUMBERS[1])).toMatch(/^1 called: Kaito Berglund/);
  expect(await call.calledTo(NUMBERS[2])).toMatch(/^1 called: Kalinda Morrow/);
  const conflict = await call.clash("Conflict", SINGER.name, "A wedding");
  expect(conflict.text).toContain("30 min of this call");
  expect(conflict.text).not.toContain("00:00");
  expect(conflict.offers).toContain(`Leave ${SINGER.name} out`);
  const room = await call.clash("Room 1 is taken by a music call of Marrow Street");
  expect(room.offers).toContain("Take Room 2");
  const pianist = await call.clash("Hanne Briscoe plays for a music call of Marrow Street");
  expect(pianist.offers).toContain("Osric Dlamini plays instead");
  expect((await call.clash("Runa Oake leads")).text).toContain("Choose somebody else to lead");

  await call.lead("Ilse Varga");
  await call.accept("Take Room 2");
  await call.accept("Osric Dlamini plays instead");
  await call.accept(`Leave ${SINGER.name} out`);
  await until(async () => /^No clash/.test(await call.status()), {
    what: "a call without clashes",
  });
  made.call = await call.save();
}

/** The call is published. */
export async function publishTheCall({ md, phone, made }: Job): Promise<void> {
  const call = new CallPage(md);
  await call.publish();
  expect(await call.words()).toMatch(/Room 2 · Osric Dlamini at the piano · 3 numbers/);
  await visit(md, `${made.production}/pianists`);
  await md
    .getByRole("region", { name: spoken(CALL_DATE) })
    .getByText("18:30–20:00, assigned")
    .first()
    .waitFor();
  const own = new OwnPage(phone);
  await own.open();
  expect((await own.comingUp()).join()).not.toContain("Music call");
}

/** The stage manager, signed in by a link, issues the call sheet and takes it away. */
export async function issueTheSheet({ stage, mailbox, made }: Job): Promise<void> {
  const desk = await stage.desk("Bram Teller");
  await signInByLink(desk, PEOPLE.stageManager, mailbox);
  const sheet = new SheetPage(desk);
  await sheet.open(made.production, spoken(CALL_DATE));
  const expected = [
    ["18:30–19:00", `1 ${NUMBERS[0]}`, "Kalinda Morrow", "Room 2"],
    ["19:00–19:30", `2 ${NUMBERS[1]}`, "Kaito Berglund", "Room 2"],
    ["19:30–20:00", `3 ${NUMBERS[2]}`, "Kalinda Morrow", "Room 2"],
  ];
  expect(await sheet.blocks()).toEqual(expected);
  const notes = ["=1+1 is not worked out", "@home: learn it", "Bring a pencil"];
  made.issue = await sheet.issue(notes.join("\n"));
  expect(await sheet.blocks()).toEqual(expected);
  for (const words of [TITLE, "issue 1", "Ilse Varga leads", "20:00 Kalinda Morrow", ...notes])
    expect((await sheet.paper()).replaceAll(/\s+/g, " ")).toContain(words);

  const file = await sheet.download(/\.xlsx/);
  expect(file.name).toBe(`${TITLE} ${CALL_DATE}, issue 1.xlsx`);
  const workbook = readWorkbook(file.path);
  const head = workbook.rows.findIndex((row) => row[0] === "When");
  expect(workbook.rows[head]).toEqual(["When", "What", "Bars", "Who", "Where", "Pianist"]);
  expect(workbook.rows.slice(head + 1, head + 5)).toEqual([
    ...expected.map(([when, what, who, where]) => [when, what, "", who, where, "Osric Dlamini"]),
    expect.not.arrayContaining(["Room 2"]),
  ]);
  expect(workbook.rows.flat()).toEqual(expect.arrayContaining(notes));
  expect(workbook).toMatchObject({ formulas: 0, paper: "9", landscape: true });
  const { words, pages } = await sheet.print();
  expect(words).toContain(TITLE);
  // The frame, the buttons and who has read it stay on the screen.
  expect(words).not.toMatch(/Auditions|Print|Take away|Who has read it/);
  // A4 upright, in points.
  expect(pages.toString("latin1")).toMatch(/\/MediaBox \[0 0 59[45]\S* 84[12]/);
}

/** The accompanist sees only their own sessions, in order, with room, people and music. */
export async function lookAtSessions({ stage, mailbox }: Job): Promise<void> {
  const desk = await stage.desk("Osric Dlamini");
  await acceptInvitation(desk, await mailbox.link(PEOPLE.osric, new RegExp(TITLE)), PEOPLE.osric);
  const sessions = await sessionsOf(desk);
  const days = sessions.map((words) => /^\w+ \d+ \w+ \d\d:\d\d/.exec(words)?.[0] ?? "");
  expect(days).toEqual(days.toSorted((a, b) => whenOf(a) - whenOf(b)));
  const mine = sessions.filter((words) => words.includes(TITLE));
  expect(mine).toHaveLength(2);
  expect(mine[0]).toContain(`${spoken(AUDITION_DATE)} 10:00–16:00`);
  expect(mine[0]).toContain("Room 2, Lantern Street");
  expect(mine[1]).toContain(`${spoken(CALL_DATE)} 18:30–20:00`);
  for (const words of [...NUMBERS, "Room 2", "Kalinda Morrow", "Kaito Berglund", "Bram Teller"])
    expect(mine[1]).toContain(words);
  expect(sessions.join()).not.toContain("Room 1");
  expect(mine[1]).not.toContain(SINGER.name);
}

/** An instant to sort by, from "Friday 4 December 10:00"; the months before the demo's are next year's. */
function whenOf(words: string): number {
  const year = dayOfDemo(0).slice(0, 4);
  const at = Date.parse(`${words.replace(/^\w+ /, "").replace(/ (?=\d\d:)/, ` ${year} `)} UTC`);
  return at < Date.parse(dayOfDemo(-1)) ? at + 366 * 86_400_000 : at;
}
