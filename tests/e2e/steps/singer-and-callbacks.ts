import { expect } from "vitest";
import { spoken } from "../helpers/dates";
import { AUDITION_DATE, CALL_DATE, CALLBACK_DATE, SINGER, TITLE } from "../helpers/job";
import type { Job } from "../helpers/job";
import { DayPage } from "../pages/auditions";
import { CallbacksPage } from "../pages/callbacks";
import { OwnPage } from "../pages/own-page";
import { acceptInvitation } from "../pages/sign-in";

/** A singer, invited by e-mail, confirms the slot on a phone. */
export async function confirmOnThePhone(job: Job): Promise<void> {
  const { stage, mailbox, md } = job;
  const day = new DayPage(md);
  const place = await day.placeOf(SINGER.name);
  expect(await day.inviteEveryone()).toContain(
    `Your audition for ${TITLE}: ${spoken(AUDITION_DATE)}`,
  );
  const phone = await stage.phone(SINGER.name);
  job.phone = phone;
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
}

/** The singer gives a range on the drawn keyboard, and a date that is impossible. */
export async function giveRangeAndDates({ phone }: Job): Promise<void> {
  const own = new OwnPage(phone);
  await own.giveRange("C3", "A4");
  await own.cannotCome(CALL_DATE, "A wedding");
  expect((await own.dates()).join()).toContain(spoken(CALL_DATE));
}

/** The range heard is written down, and the verdicts follow from it. */
export async function writeRangeHeard({ md, made }: Job): Promise<void> {
  const callbacks = new CallbacksPage(md);
  await callbacks.open(made.production);
  await callbacks.beginRound();
  await callbacks.row(SINGER.name).getByText("C3–A4 · claimed").first().waitFor();
  await callbacks.hear(SINGER.name, "B2", "B♭4");
  // 1st Tenor reaches B4, a semitone above; 2nd Tenor lies within; 2nd Bass starts seven semitones below B2.
  expect(await callbacks.verdict(SINGER.name, "Alto (or 1st Tenor)")).toContain("1 short at top");
  expect(await callbacks.verdict(SINGER.name, "2nd Tenor")).toContain("Fits");
  expect(await callbacks.verdict(SINGER.name, "2nd Bass")).toContain("7 short below");
}

/** Callbacks are marked, and nobody sees them before they are published. */
export async function publishCallbacks({ mailbox, md, phone }: Job): Promise<void> {
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
}
