import { afterAll, beforeAll, describe, expect } from "vitest";
import type { Page } from "playwright-core";
import { dayOfDemo } from "./helpers/dates";
import { PEOPLE } from "./helpers/demo-season";
import { holdBack } from "./helpers/hold-back";
import { journey } from "./helpers/journey";
import { Stage } from "./helpers/stage";
import { until } from "./helpers/until";
import { DayPage, ImportPage, makeDay } from "./pages/auditions";
import { CallbacksPage } from "./pages/callbacks";
import { CastingPage } from "./pages/casting";
import { invite, makeProduction } from "./pages/productions";
import { ScorePage } from "./pages/score";
import { signInWithPassword } from "./pages/sign-in";
import { visit } from "./pages/visit";

const TITLE = `Two at the Ferry ${Date.now().toString(36)}`;
const ROOM = "Rope Hall";
const ROLE = "The Ferryman";
const SINGERS = ["Ode Marlow", "Pim Aster", "Quill Verran"] as const;
const SHEET = [
  "Name,E-mail,Lowest note,Highest note",
  ...SINGERS.map((name) => `${name},${name.toLowerCase().replace(" ", ".")}@singers.example,C3,A4`),
].join("\n");
/** What "within seconds" has to mean to two people who talk to each other meanwhile. */
const SECONDS = 12;
const READERS = /\/api\/productions\/[^/]+\/(auditions|casting)/;

let stage: Stage;
let runa: Page;
let ilse: Page;
let production = "";
let dayAddress = "";

beforeAll(async () => {
  stage = await Stage.open();
});

afterAll(() => stage.close());

describe("a music director and an assistant, at the same time", () => {
  const step = journey(() => stage);

  step("both sit down at the same production", async () => {
    [runa, ilse] = [await stage.desk("Runa Oake"), await stage.desk("Ilse Varga")];
    await signInWithPassword(runa, PEOPLE.md);
    production = await makeProduction(runa, { title: TITLE, company: "Lantern Street Theatre" });
    const score = new ScorePage(runa);
    await runa.getByRole("button", { name: "Add a role" }).waitFor();
    await score.addRole(ROLE);
    await score.addNumber("1", "Low Water", "2:40");
    await score.typeLine(ROLE, "Low Water", "C3", "E4");
    await visit(runa, `${production}/people`);
    const position = "Assistant music director";
    await invite(runa, { name: "Ilse Varga", address: PEOPLE.assistant, position });
    dayAddress = await makeDay(runa, production, {
      date: dayOfDemo(15),
      rooms: [{ name: ROOM, opens: "10:00", closes: "12:00" }],
      slotMinutes: "8",
    });
    const sheet = new ImportPage(runa);
    await sheet.choose(production, {
      name: "three.csv",
      mimeType: "text/csv",
      buffer: Buffer.from(SHEET),
    });
    await sheet.signUp();
    const day = new DayPage(runa);
    await day.open(dayAddress);
    await day.placeEveryone();
    await day.slotOf(SINGERS[2]).waitFor();
    await signInWithPassword(ilse, PEOPLE.assistant);
  });

  step("both move a singer into the same free slot: one gets it, the other is told", async () => {
    const [one, other] = [new DayPage(runa), new DayPage(ilse)];
    await Promise.all([one.open(dayAddress), other.open(dayAddress)]);
    const before = [await one.placeOf(SINGERS[0]), await one.placeOf(SINGERS[1])];
    expect(await one.isFree("11:30", ROOM)).toBe(true);
    const release = await Promise.all([holdBack(runa, READERS), holdBack(ilse, READERS)]);
    await Promise.all([stay(runa), stay(ilse)]);
    await Promise.all([
      one.press(SINGERS[0], "11:30", ROOM),
      other.press(SINGERS[1], "11:30", ROOM),
    ]);
    const ends = await Promise.all([outcome(runa), outcome(ilse)]);
    expect(ends.toSorted()).toEqual(["got it", "told"]);
    await Promise.all(release.map((letGo) => letGo()));
    const [winner, loser] = ends[0] === "got it" ? [0, 1] : [1, 0];
    for (const day of [one, other]) {
      await day
        .slot("11:30", ROOM)
        .and(day.slotOf(SINGERS[winner]!))
        .waitFor({ timeout: SECONDS * 1000 });
      expect(await day.placeOf(SINGERS[loser]!)).toBe(before[loser]);
    }
    expect(await Promise.all([stayed(runa), stayed(ilse)])).toEqual([true, true]);
  });

  step("what one moves, the other sees within seconds and without loading the page", async () => {
    const [one, other] = [new DayPage(runa), new DayPage(ilse)];
    await one.drag(SINGERS[2], "11:38", ROOM);
    await other
      .slot("11:38", ROOM)
      .and(other.slotOf(SINGERS[2]))
      .waitFor({ timeout: SECONDS * 1000 });
    expect(await stayed(ilse)).toBe(true);
  });

  step(
    "both choose in the same cell of the grid: one choice stands, the other is asked",
    async () => {
      const callbacks = new CallbacksPage(runa);
      await callbacks.open(production);
      await callbacks.beginRound();
      await callbacks.mark(SINGERS[0], ROLE);
      await callbacks.mark(SINGERS[1], ROLE);
      await runa.getByText("2 of 3 called back").waitFor();
      const [one, other] = [new CastingPage(runa), new CastingPage(ilse)];
      await Promise.all([one.open(production), other.open(production)]);
      await Promise.all([one.look(SINGERS[0], ROLE), other.look(SINGERS[0], ROLE)]);
      const release = await Promise.all([holdBack(runa, READERS), holdBack(ilse, READERS)]);
      await Promise.all([stay(runa), stay(ilse)]);
      await Promise.all([one.choice("Cast").click(), other.choice("Consider").click()]);
      const asked = await until(
        async () => {
          for (const page of [runa, ilse]) {
            const question = page.getByText("Someone else changed this while you were looking.");
            if (await question.first().isVisible()) return page;
          }
          return null;
        },
        { what: "one of the two to be asked" },
      );
      await Promise.all(release.map((letGo) => letGo()));
      const stands = asked === ilse ? "Cast" : "Considered";
      const grid = asked === ilse ? other : one;
      await grid.side.getByText("In the grid now").waitFor();
      await until(
        async () => (await grid.side.innerText()).includes(`In the grid now\n${stands}`),
        {
          what: `the question to say ${stands}`,
          seconds: SECONDS,
        },
      );
      await grid.side.getByRole("button", { name: "Keep what is there" }).click();
      for (const each of [one, other])
        await until(() => each.says(SINGERS[0], ROLE, stands), {
          what: `both to see ${stands}`,
          seconds: SECONDS,
        });
    },
  );

  step("what one chooses, the other sees within seconds and without loading the page", async () => {
    // The part may be taken by now: whoever won above may have cast it.
    const one = new CastingPage(runa);
    await one.look(SINGERS[1], ROLE);
    await one.choice("Cover").click();
    await until(() => new CastingPage(ilse).says(SINGERS[1], ROLE, "Cover"), {
      what: "the other to see who covers",
      seconds: SECONDS,
    });
    expect(await stayed(ilse)).toBe(true);
    expect(stage.complaints).toEqual([]);
  });
});

/** Whether the move in front went through, or the person was told why not and what to do. */
function outcome(page: Page): Promise<string> {
  const refused = /sings at 11:30 in Rope Hall\. Choose a free slot|Choose another free slot/;
  return until(
    async () => {
      if (await page.getByText(refused).first().isVisible()) return "told";
      const done = page.getByText(`sings at 11:30, ${ROOM}.`);
      return (await done.first().isVisible()) && "got it";
    },
    { what: "an answer to the move" },
  );
}

/** Leaves a mark that is gone when the page is loaded again. */
const stay = (page: Page): Promise<void> =>
  page.evaluate(() => document.documentElement.setAttribute("data-stayed", ""));
const stayed = (page: Page): Promise<boolean> =>
  page.evaluate(() => document.documentElement.hasAttribute("data-stayed"));
