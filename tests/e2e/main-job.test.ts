import path from "node:path";
import { afterAll, beforeAll, describe, expect } from "vitest";
import type { Page } from "playwright-core";
import { dayOfDemo, isSaturday, spoken } from "./helpers/dates";
import { PEOPLE } from "./helpers/demo-season";
import { journey } from "./helpers/journey";
import { Mailbox } from "./helpers/mailbox";
import { readWorkbook } from "./helpers/read-workbook";
import { octaveDown, partsOf } from "./helpers/reference";
import { addressesOf, ASKERS, wrongAnswers } from "./helpers/refusals";
import type { Made } from "./helpers/refusals";
import { Stage } from "./helpers/stage";
import { until } from "./helpers/until";
import { DayPage, ImportPage, makeDay } from "./pages/auditions";
import { SheetPage } from "./pages/call-sheets";
import { CallbacksPage } from "./pages/callbacks";
import { CastingPage } from "./pages/casting";
import { OwnPage } from "./pages/own-page";
import { invite, makeProduction, startCompany } from "./pages/productions";
import { CallForm, CallPage } from "./pages/rehearsals";
import { ScorePage } from "./pages/score";
import { sessionsOf } from "./pages/sessions";
import { acceptInvitation, signInByLink, signInWithPassword } from "./pages/sign-in";
import { told, visit } from "./pages/visit";

const ROOT = path.resolve(import.meta.dirname, "../..");
const SCORE = path.join(ROOT, "db/seed/music/sullivan-the-long-day-closes.mxl");
const SHEETS = path.join(ROOT, "tests/fixtures/sheets");
const TITLE = `Evensong ${Date.now().toString(36)}`;
const SINGER = { name: "Eilidh Castellanos", address: "eilidh.castellanos@singers.example" };
/** The demo season has a music call of Marrow Street in Room 1 that evening, led by Runa Oake, with Hanne Briscoe. */
const CALL_DATE = dayOfDemo(8);
/** A day on which the demo season takes neither room: its Saturdays are busy. */
const AUDITION_DATE = isSaturday(dayOfDemo(4)) ? dayOfDemo(5) : dayOfDemo(4);
const CALLBACK_DATE = dayOfDemo(6);
const NUMBERS = ["The Long Day Closes", "Low Water", "Lamps Out"] as const;

let stage: Stage;
let mailbox: Mailbox;
let md: Page;
let phone: Page;
const made: Made = {
  production: "",
  reading: "",
  day: "",
  call: "",
  callDate: CALL_DATE,
  issue: "",
};

beforeAll(async () => {
  stage = await Stage.open();
  mailbox = new Mailbox();
});

afterAll(() => stage.close());

describe("one production, from the score to the call sheet", () => {
  const step = journey(() => stage);

  step("1 the music director makes a production", async () => {
    md = await stage.desk("Runa Oake");
    await signInWithPassword(md, PEOPLE.md);
    made.production = await makeProduction(md, {
      title: TITLE,
      company: "Lantern Street Theatre",
    });
    await md.getByRole("heading", { name: "No numbers and no roles yet" }).waitFor();
  });

  step("1 a score is read: its parts become roles, with the ranges of the reference", async () => {
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
  });

  step("1 a role, two numbers and two lines are typed in", async () => {
    const score = new ScorePage(md);
    await score.addRole("The Ferryman");
    await score.addNumber("2", NUMBERS[1], "2:40");
    await score.addNumber("3", NUMBERS[2], "3:10");
    await score.typeLine("The Ferryman", NUMBERS[1], "C3", "E4");
    await score.typeLine("2nd Bass", NUMBERS[2], "F2", "C4");
    await md.getByText("3 numbers, 5 roles").first().waitFor();
  });

  step("2 people are invited into their positions", async () => {
    await visit(md, `${made.production}/people`);
    for (const [name, address, position] of [
      ["Ilse Varga", PEOPLE.assistant, "Assistant music director"],
      ["Bram Teller", PEOPLE.stageManager, "Stage manager"],
      ["Odile Castellane", PEOPLE.director, "Director"],
      ["Hanne Briscoe", PEOPLE.hanne, "Accompanist"],
      ["Osric Dlamini", PEOPLE.osric, "Accompanist"],
    ] as const)
      await invite(md, { name, address, position });
  });

  step("2 an audition day has two rooms, slots of 8 minutes, lunch and rests", async () => {
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
  });

  step(
    "2 forty singers come from a spreadsheet; three rows say what is wrong with them",
    async () => {
      const sheet = new ImportPage(md);
      await sheet.choose(made.production, path.join(SHEETS, "singers.csv"));
      const fromText = await sheet.preview();
      await sheet.choose(made.production, path.join(SHEETS, "singers.xlsx"));
      expect(await sheet.preview()).toEqual(fromText);
      expect(fromText).toHaveLength(43);
      // What is wrong stands in the file's own description: lines 22 to 24 (tests/fixtures/sheets/README.md).
      expect(await sheet.leftOut()).toEqual({
        "22": [
          expect.stringContaining("name is missing"),
          expect.stringContaining("not an e-mail"),
        ],
        "23": [expect.stringMatching(/lowest note, D4, is above the highest, E2/)],
        "24": [
          expect.stringContaining("“H9” is not a note"),
          expect.stringContaining("“a few” is not a number of bars"),
          expect.stringContaining("in line 2 already"),
        ],
      });
      await sheet.signUp();
      await told(md, /^40 singers signed up/);
    },
  );

  step("2 everyone is placed within the times they asked for", async () => {
    const day = new DayPage(md);
    await day.open(made.day);
    await day.placeEveryone();
    await md.getByText("40 placed").waitFor();
    const slots = [...(await day.slots("Room 1")), ...(await day.slots("Room 2"))];
    expect(slots.filter((slot) => slot.endsWith(", listed"))).toHaveLength(40);
    expect(slots.filter((slot) => slot.includes("asked for"))).toEqual([]);
  });

  step("2 singers are moved by pointer and by keyboard, and two change places", async () => {
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
  });

  step("2 two pianists are assigned, and one who is taken is refused with the reason", async () => {
    const day = new DayPage(md);
    await day.assignPianist("Hanne Briscoe", "Room 1", "10:00", "16:00");
    await day.askForPianist("Hanne Briscoe", "Room 2", "11:30", "13:00");
    expect(await day.refused(/Hanne Briscoe plays/)).toMatch(
      new RegExp(`${TITLE} in Room 1, 10:00–16:00. Choose another pianist, or times outside that`),
    );
    await day.assignPianist("Osric Dlamini", "Room 2", "10:00", "16:00");
    await md.getByText("no pianist for part of the day").waitFor({ state: "detached" });
  });

  step("3 a singer, invited by e-mail, confirms the slot on a phone", async () => {
    const day = new DayPage(md);
    const place = await day.placeOf(SINGER.name);
    expect(await day.inviteEveryone()).toContain(
      `Your audition for ${TITLE}: ${spoken(AUDITION_DATE)}`,
    );
    phone = await stage.phone(SINGER.name);
    await acceptInvitation(phone, await mailbox.link(SINGER.address, /^Your audition/));
    const own = new OwnPage(phone);
    await own.open();
    const audition = await own.decision("Your audition").innerText();
    expect(audition).toContain(spoken(AUDITION_DATE));
    for (const words of place.split(/(?<=:\d\d) /)) expect(audition).toContain(words);
    await own.sayYes();
    await day
      .slotOf(SINGER.name)
      .and(md.getByRole("button", { name: ", confirmed" }))
      .waitFor();
  });

  step(
    "3 the singer gives a range on the drawn keyboard, and a date that is impossible",
    async () => {
      const own = new OwnPage(phone);
      await own.giveRange("C3", "A4");
      await own.cannotCome(CALL_DATE, "A wedding");
      expect((await own.dates()).join()).toContain(spoken(CALL_DATE));
    },
  );

  step("4 the range heard is written down, and the verdicts follow from it", async () => {
    const callbacks = new CallbacksPage(md);
    await callbacks.open(made.production);
    await callbacks.beginRound();
    await callbacks.row(SINGER.name).getByText("C3–A4 · claimed").first().waitFor();
    await callbacks.hear(SINGER.name, "B2", "B♭4");
    // 1st Tenor reaches B4, a semitone above; 2nd Tenor lies within; 2nd Bass starts seven semitones below B2.
    expect(await callbacks.verdict(SINGER.name, "Alto (or 1st Tenor)")).toContain("1 short at top");
    expect(await callbacks.verdict(SINGER.name, "2nd Tenor")).toContain("Fits");
    expect(await callbacks.verdict(SINGER.name, "2nd Bass")).toContain("7 short below");
  });

  step("4 callbacks are marked, and nobody sees them before they are published", async () => {
    const callbacks = new CallbacksPage(md);
    await callbacks.mark(SINGER.name, "Alto (or 1st Tenor)");
    await callbacks.mark(SINGER.name, "2nd Tenor");
    await callbacks.mark("Kalinda Morrow", "2nd Bass");
    await callbacks.mark("Kaito Berglund", "The Ferryman");
    await md.getByText("3 of 40 called back").waitFor();
    await callbacks.sayWhen({
      date: CALLBACK_DATE,
      from: "18:00",
      to: "20:00",
      room: "Rope Hall, The Rope Walk",
      prepare: "Bars 17 to 34",
    });
    const own = new OwnPage(phone);
    await own.open();
    const before = await own.words();
    expect(before).toContain("Nothing needs your answer.");
    expect(before).not.toMatch(/called back|callback/i);
    expect(mailbox.waiting(SINGER.address)).toEqual([]);
    expect(await callbacks.publish()).toContain("3 people are told.");
    await mailbox.letter(SINGER.address, /^Callback for/);
    await own.open();
    const after = await own.decision("You’re called back").innerText();
    for (const words of [
      "Alto (or 1st Tenor)",
      "2nd Tenor",
      spoken(CALLBACK_DATE),
      "18:00",
      "Rope Hall",
      "Bars 17 to 34",
    ])
      expect(after).toContain(words);
    expect(after).not.toMatch(/Kalinda|Kaito|Ferryman/);
    await own.sayYes();
    await callbacks.row(SINGER.name).getByText("Will come").first().waitFor();
  });

  step("5 the grid says how each singer fits each role, and they are cast", async () => {
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
  });

  step("6 a music call shows who is needed, and every clash with what to do", async () => {
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
    expect(await call.calledTo(NUMBERS[0])).toContain(
      "Not cast yet: Alto (or 1st Tenor), 1st Bass",
    );
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
  });

  step("6 the call is published", async () => {
    const call = new CallPage(md);
    await call.publish();
    expect(await call.words()).toMatch(/Room 2 · Osric Dlamini at the piano · 3 numbers/);
    await visit(md, `${made.production}/pianists`);
    await md
      .getByRole("region", { name: spoken(CALL_DATE) })
      .getByText("Osric Dlamini", { exact: true })
      .first()
      .waitFor();
    const own = new OwnPage(phone);
    await own.open();
    expect((await own.comingUp()).join()).not.toContain("Music call");
  });

  step(
    "7 the stage manager, signed in by a link, issues the call sheet and takes it away",
    async () => {
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
        ...expected.map(([when, what, who, where]) => [
          when,
          what,
          "",
          who,
          where,
          "Osric Dlamini",
        ]),
        expect.not.arrayContaining(["Room 2"]),
      ]);
      expect(workbook.rows.flat()).toEqual(expect.arrayContaining(notes));
      expect(workbook).toMatchObject({ formulas: 0, paper: "9", landscape: true });
      // A4 upright, in points.
      expect((await sheet.print()).toString("latin1")).toMatch(/\/MediaBox \[0 0 59[45]\S* 84[12]/);
    },
  );

  step(
    "8 the accompanist sees only their own sessions, in order, with room, people and music",
    async () => {
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
    },
  );
});

describe("the same as someone who may not", () => {
  const step = journey(() => stage);
  const secrets = [TITLE, SINGER.name, "Kalinda Morrow"];
  const askers: Partial<Record<(typeof ASKERS)[number], () => Promise<Page>>> = {
    "music director": async () => md,
    singer: async () => phone,
    nobody: () => stage.desk("nobody"),
    "stage manager": () => withPassword("stage manager", PEOPLE.stageManager),
    "director at the table": () => withPassword("director", PEOPLE.director),
    accompanist: () => withPassword("accompanist", PEOPLE.osric),
    "music director elsewhere": async () => {
      const desk = await stage.desk("elsewhere");
      await signInByLink(desk, `md.${Date.now().toString(36)}@elsewhere.example`, mailbox);
      await startCompany(desk, "Quayside Players");
      await makeProduction(desk, { title: "Somebody Else’s" });
      return desk;
    },
  };

  for (const asker of ASKERS) {
    step(`every page and download, asked for by: ${asker}`, async () => {
      expect(made.issue).not.toBe("");
      const page = await askers[asker]!();
      expect(await wrongAnswers(page, asker, addressesOf(made), secrets)).toEqual([]);
    });
  }

  step("a call sheet opens for those who are called, and for no other singer", async () => {
    const own = `/me/call-sheets/${made.issue.split("/").at(-1) ?? ""}`;
    expect((await phone.goto(own))?.status()).toBe(404);
  });

  step("no browser complained of anything on the way", async () => {
    expect(stage.complaints).toEqual([]);
  });
});

async function withPassword(name: string, address: string): Promise<Page> {
  const desk = await stage.desk(name);
  await signInWithPassword(desk, address);
  return desk;
}

/** Minutes after midnight at which a slot starts, from its label "10:08 Room 1, free". */
function minutesOf(slot: string): number {
  const [hours = 0, minutes = 0] = slot.slice(0, 5).split(":").map(Number);
  return hours * 60 + minutes;
}

/** An instant to sort by, from "Friday 4 December 10:00"; the months after the demo's are next year's. */
function whenOf(words: string): number {
  const year = Number(dayOfDemo(0).slice(0, 4));
  const at = Date.parse(
    `${words.replace(/^\w+ /, "").replace(/ (?=\d\d:)/, ` ${String(year)} `)} UTC`,
  );
  return at < Date.parse(dayOfDemo(-1)) ? at + 366 * 86_400_000 : at;
}
