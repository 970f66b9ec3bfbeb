import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { Road } from "@/lib/data/season/road";
import { dayAndClock, shortDay } from "@/lib/format-dates";

export type RoadStep = { area: string; title: string; href: string; figure: string; words: string };

const count = (n: number, thing: string) => `${String(n)} ${thing}${n === 1 ? "" : "s"}`;

/** The steps the reader may open, each with how far it is and what comes next, in words. */
export function roadSteps(road: Road): RoadStep[] {
  const steps: RoadStep[] = [];
  const add = (area: string, title: string, figure: string, words: string) =>
    steps.push({ area, title, href: `/productions/${road.production.id}/${area}`, figure, words });
  const { score, auditions, callbacks, casting, rehearsals, sheets } = road;
  if (score) {
    add(
      "score",
      "Score",
      `${count(score.numbers, "number")}, ${count(score.roles, "role")}`,
      score.numbers === 0
        ? "Bring a score in, or type numbers and roles: all that follows rests on them."
        : "What each role sings, and how high and low.",
    );
  }
  if (auditions) {
    add(
      "auditions",
      "Auditions",
      auditions.days + auditions.signUps === 0
        ? "nobody signed up"
        : `${count(auditions.days, "day")}, ${String(auditions.placed)} of ${String(auditions.signUps)} with a slot`,
      auditions.days === 0
        ? "No audition day yet."
        : auditions.nextDay === null
          ? "All days are over."
          : `The next day is ${shortDay(auditions.nextDay)}.`,
    );
  }
  if (callbacks) {
    add(
      "callbacks",
      "Callbacks",
      callbacks.rounds === 0
        ? "no round yet"
        : callbacks.told === 0
          ? "nobody told yet"
          : `${String(callbacks.told)} told`,
      callbacks.told === 0
        ? "Nobody outside the music team and the table sees the list before it is published."
        : `${String(callbacks.yes)} said yes, ${String(callbacks.no)} said no, ${String(callbacks.told - callbacks.yes - callbacks.no)} have not answered.`,
    );
  }
  if (casting) {
    add(
      "casting",
      "Casting",
      casting.roles === 0
        ? "no roles yet"
        : `${String(casting.cast)} of ${count(casting.roles, "role")} cast`,
      casting.published
        ? "The cast list is out."
        : "The cast list is not out: only the music team and the table see the grid.",
    );
  }
  if (rehearsals) {
    const { next } = rehearsals;
    add(
      "rehearsals",
      "Rehearsals",
      rehearsals.ahead === 0 ? "no calls ahead" : `${count(rehearsals.ahead, "call")} ahead`,
      next === null
        ? "Make a call from the numbers to be worked on; who is needed follows from the score."
        : `Next: ${CALL_KIND_NAMES[next.kind].toLowerCase()}, ${dayAndClock(next.from, next.zone)}${next.room === null ? "" : `, ${next.room}`}.`,
    );
  }
  if (sheets) {
    add(
      "call-sheets",
      "Call sheets",
      sheets.issues === 0 ? "none issued" : `${String(sheets.issues)} issued`,
      sheets.last === null
        ? "A sheet is made from the calls of a day, and numbered when it goes out."
        : `The last: ${shortDay(sheets.last.day)}, issue ${String(sheets.last.number)}.`,
    );
  }
  return steps;
}
