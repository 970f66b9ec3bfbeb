import type { Page } from "playwright-core";
import { dayOfDemo, isSaturday } from "./dates";
import type { Mailbox } from "./mailbox";
import type { Stage } from "./stage";

/** The addresses that one run through the main job leaves behind, in the order in which they come to be. */
export type Made = {
  production: string;
  reading: string;
  day: string;
  call: string;
  issue: string;
};

/** What the steps of the main job hand on to each other. */
export type Job = {
  stage: Stage;
  mailbox: Mailbox;
  /** The music director's desk. */
  md: Page;
  /** The singer's phone. */
  phone: Page;
  made: Made;
};

/** A title of this run alone, so that nothing of another run is taken for it. */
export const TITLE = `Evensong ${Date.now().toString(36)}`;
/** One of the forty of tests/fixtures/sheets; the demo season does not know her yet. */
export const SINGER = {
  name: "Eilidh Castellanos",
  address: "eilidh.castellanos@singers.example",
};
export const NUMBERS = ["The Long Day Closes", "Low Water", "Lamps Out"] as const;

/** The demo season has a music call of Marrow Street in Room 1 that evening, led by Runa Oake, with Hanne Briscoe. */
export const CALL_DATE = dayOfDemo(8);
/** A day on which the demo season takes neither room: its Saturdays are busy. */
export const AUDITION_DATE = isSaturday(dayOfDemo(4)) ? dayOfDemo(5) : dayOfDemo(4);
export const CALLBACK_DATE = dayOfDemo(6);
