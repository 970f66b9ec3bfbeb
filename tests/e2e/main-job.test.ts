import { afterAll, beforeAll, describe } from "vitest";
import type { Job } from "./helpers/job";
import { journey } from "./helpers/journey";
import { Mailbox } from "./helpers/mailbox";
import { Stage } from "./helpers/stage";
import {
  castFromTheGrid,
  issueTheSheet,
  lookAtSessions,
  makeTheCall,
  publishTheCall,
} from "./steps/casting-to-sessions";
import { ASKERS, askForEverything, complaints, otherSheets } from "./steps/refusals";
import {
  assignPianists,
  importSingers,
  inviteTheTeam,
  makeTheDay,
  makeTheProduction,
  moveSingers,
  placeEveryone,
  readTheScore,
  typeWhatIsMissing,
} from "./steps/score-and-auditions";
import {
  confirmOnThePhone,
  giveRangeAndDates,
  publishCallbacks,
  writeRangeHeard,
} from "./steps/singer-and-callbacks";

// The two pages come with the steps that open them.
const job = { made: { production: "", reading: "", day: "", call: "", issue: "" } } as Job;

beforeAll(async () => {
  job.stage = await Stage.open();
  job.mailbox = new Mailbox();
});

afterAll(() => job.stage.close());

describe("one production, from the score to the call sheet", () => {
  const step = journey(() => job.stage);

  step("1 the music director makes a production", () => makeTheProduction(job));
  step("1 a score is read: its parts become roles, with the ranges of the reference", () =>
    readTheScore(job),
  );
  step("1 a role, two numbers and two lines are typed in", () => typeWhatIsMissing(job));
  step("2 people are invited into their positions", () => inviteTheTeam(job));
  step("2 an audition day has two rooms, slots of 8 minutes, lunch and rests", () =>
    makeTheDay(job),
  );
  step("2 forty singers come from a spreadsheet; three rows say what is wrong with them", () =>
    importSingers(job),
  );
  step("2 everyone is placed within the times they asked for", () => placeEveryone(job));
  step("2 singers are moved by pointer and by keyboard, and two change places", () =>
    moveSingers(job),
  );
  step("2 two pianists are assigned, and one who is taken is refused with the reason", () =>
    assignPianists(job),
  );
  step("3 a singer, invited by e-mail, confirms the slot on a phone", () => confirmOnThePhone(job));
  step("3 the singer gives a range on the drawn keyboard, and a date that is impossible", () =>
    giveRangeAndDates(job),
  );
  step("4 the range heard is written down, and the verdicts follow from it", () =>
    writeRangeHeard(job),
  );
  step("4 callbacks are marked, and nobody sees them before they are published", () =>
    publishCallbacks(job),
  );
  step("5 the grid says how each singer fits each role, and they are cast", () =>
    castFromTheGrid(job),
  );
  step("6 a music call shows who is needed, and every clash with what to do", () =>
    makeTheCall(job),
  );
  step("6 the call is published", () => publishTheCall(job));
  step("7 the stage manager, signed in by a link, issues the call sheet and takes it away", () =>
    issueTheSheet(job),
  );
  step(
    "8 the accompanist sees only their own sessions, in order, with room, people and music",
    () => lookAtSessions(job),
  );
  for (const asker of ASKERS)
    step(`every page and download, asked for by: ${asker}`, () => askForEverything(job, asker));
  step("a call sheet opens for those who are called, and for no other singer", () =>
    otherSheets(job),
  );
  step("no browser complained of anything on the way", () => complaints(job));
});
