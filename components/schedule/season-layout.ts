import type { SeasonGroup, SeasonProduction, SeasonWeek } from "./season-types";

/** Between two lines of a stave, in px; a note sits on a line or between two. */
export const LINE_GAP = 11;
export const STAVE_HEIGHT = LINE_GAP * 4;
export const HEAD_HEIGHT = 44;
export const GROUP_HEIGHT = 34;
export const ROW_HEIGHT = 92;
/** From the top of a row to the first line of its stave. */
export const STAVE_TOP = 24;
/** Room for the bracket, left of the first bar line. */
export const BRACKET_WIDTH = 14;

const FIRST_MINUTE = 9 * 60;
const LAST_MINUTE = 22 * 60;
const DAY_MS = 86_400_000;

/** How far down its stave an hour lies: 09:00 on the top line, 22:00 on the bottom one, in half steps. */
export function heightOnStave(minutesOfDay: number): number {
  const share = (minutesOfDay - FIRST_MINUTE) / (LAST_MINUTE - FIRST_MINUTE);
  return Math.round(Math.min(Math.max(share, 0), 1) * 8) * (LINE_GAP / 2);
}

/**
 * How far along the weeks a day lies, counted in weeks from the first bar line, in the middle of the
 * day; an hour moves it a little, so that two calls of a day stand beside each other. Null outside.
 */
export function placeInWeeks(
  weeks: readonly SeasonWeek[],
  localDate: string,
  minutesOfDay = 15 * 60,
): number | null {
  const day = Date.parse(`${localDate}T00:00:00Z`);
  const index = weeks.findIndex(({ start }) => {
    const days = (day - Date.parse(`${start}T00:00:00Z`)) / DAY_MS;
    return days >= 0 && days < 7;
  });
  const week = weeks[index];
  if (!week) return null;
  const days = (day - Date.parse(`${week.start}T00:00:00Z`)) / DAY_MS;
  const hour = Math.min(Math.max(minutesOfDay / 1440, 0), 1) - 0.5;
  return index + (days + 0.5 + hour * 0.8) / 7;
}

export type PlacedProduction = SeasonProduction & { staveTop: number };
export type PlacedGroup = {
  label: string;
  top: number;
  productions: readonly PlacedProduction[];
};

/** Where every stave stands, from the top of the drawing, and how tall the drawing is. */
export function placeStaves(groups: readonly SeasonGroup[]): {
  groups: readonly PlacedGroup[];
  height: number;
} {
  let y = HEAD_HEIGHT;
  const placed = groups.map((group) => {
    const top = y;
    y += GROUP_HEIGHT;
    const productions = group.productions.map((production) => {
      const staveTop = y + STAVE_TOP;
      y += ROW_HEIGHT;
      return { ...production, staveTop };
    });
    return { label: group.label, top, productions };
  });
  return { groups: placed, height: y };
}

/** Wide enough to read, and all of a usual season on a wide page without scrolling. */
export function weekWidth(count: number): number {
  return Math.min(190, Math.max(98, Math.floor(1140 / Math.max(count, 1))));
}
