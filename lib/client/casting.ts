import { queryOptions } from "@tanstack/react-query";
import type {
  CastingChoice,
  CastingGrid,
  CastingRole,
  CastingSinger,
  FitDetail,
} from "@/lib/data/casting/grid";
import { pitchName } from "@/lib/music/pitch-name";
import type { FitVerdict, PitchSpan } from "@/lib/music/types";
import type { AsJson } from "./as-json";
import { readJson } from "./read-json";

export type Grid = AsJson<CastingGrid>;
export type GridRole = AsJson<CastingRole>;
export type GridSinger = AsJson<CastingSinger>;
export type Choice = CastingChoice;

/** The casting grid as the server has it. */
export function castingQuery(productionId: string) {
  return queryOptions({
    queryKey: ["casting", productionId],
    queryFn: () => readJson<Grid>(`/api/productions/${productionId}/casting`),
  });
}

/** The words for a choice: "Cast", "Considered", "Cover"; empty where nothing is chosen. */
export function choiceInWords(choice: Pick<Choice, "state" | "kind"> | null): string {
  if (!choice) return "";
  if (choice.state === "considered") {
    return choice.kind === "principal" ? "Considered" : `Considered as ${choice.kind}`;
  }
  const cast = { principal: "Cast", alternate: "Alternate", cover: "Cover", swing: "Swing" };
  return cast[choice.kind];
}

/** The grid as it will be once this is chosen; null takes the choice back. */
export function withChoice(
  grid: Grid,
  where: { personId: string; roleId: string },
  choice: Choice | null,
): Grid {
  return {
    ...grid,
    singers: grid.singers.map((singer) => {
      const cell = singer.cells[where.roleId];
      if (singer.personId !== where.personId || !cell) return singer;
      return { ...singer, cells: { ...singer.cells, [where.roleId]: { ...cell, choice } } };
    }),
  };
}

const RANK: Record<FitVerdict, number> = { fits: 0, stretch: 1, out: 2 };

/** Semitones a singer misses of a line, bottom and top together. */
export function semitonesShort(range: PitchSpan, line: PitchSpan): number {
  return Math.max(0, line.high - range.high) + Math.max(0, range.low - line.low);
}

// Beyond half an octave nobody weighs it up; the drawings step back there too.
const FAR = 6;

/** Whether a singer is so far from a line at either end that it is no question. */
export function isFar(range: PitchSpan, line: PitchSpan): boolean {
  return Math.max(line.high - range.high, range.low - line.low) > FAR;
}

/** The singers with those who fit the role first, then by how little they miss; the unknown last. */
export function sortByFit(singers: readonly GridSinger[], role: GridRole): GridSinger[] {
  const place = (singer: GridSinger): number => {
    const verdict = singer.cells[role.id]?.verdict ?? null;
    if (verdict === null || !singer.range || !role.line) return Number.POSITIVE_INFINITY;
    return RANK[verdict] * 200 + semitonesShort(singer.range, role.line);
  };
  return singers.toSorted((a, b) => {
    const [left, right] = [place(a), place(b)];
    return left === right ? a.name.localeCompare(b.name) : left - right;
  });
}

/** All that is said of a singer in the grid, for the filter. */
export function singerText(singer: GridSinger, roles: readonly GridRole[]): string {
  const cells = roles.map((role) => {
    const choice = singer.cells[role.id]?.choice ?? null;
    return choice ? `${choiceInWords(choice)} ${role.name}` : "";
  });
  return [singer.name, ...cells].join(" ");
}

/** How many sing a role as the cast stands. */
export function castIn(grid: Grid, roleId: string): number {
  return grid.singers.filter(({ cells }) => {
    const choice = cells[roleId]?.choice;
    return choice?.state === "cast" && choice.kind === "principal";
  }).length;
}

/** The roles that still want someone. */
export function openRoles(grid: Grid): GridRole[] {
  return grid.roles.filter((role) => castIn(grid, role.id) < role.needed);
}

export type CoverCount = {
  roleId: string;
  role: string;
  fit: number;
  stretch: number;
  named: string[];
};

/**
 * For each role of one person: how many others could cover it by range, besides whoever sings it.
 * Until it is cast, as many as the role needs are taken to be among those who fit best.
 */
export function countCovers(grid: Grid): CoverCount[] {
  return grid.roles
    .filter((role) => role.kind !== "ensemble" && role.line !== null)
    .map((role) => {
      const inRole = grid.singers.map((singer) => ({ singer, cell: singer.cells[role.id] }));
      const sings = inRole.filter(
        ({ cell }) => cell?.choice?.state === "cast" && cell.choice.kind === "principal",
      );
      const others = inRole.filter((one) => !sings.includes(one));
      const count = (verdict: FitVerdict) =>
        others.filter(({ cell }) => cell?.verdict === verdict).length;
      let open = Math.max(0, role.needed - sings.length);
      const take = (many: number) => {
        const taken = Math.min(open, many);
        open -= taken;
        return many - taken;
      };
      return {
        roleId: role.id,
        role: role.name,
        fit: take(count("fits")),
        stretch: take(count("stretch")),
        named: others
          .filter(({ cell }) => cell?.choice?.state === "cast")
          .map(({ singer }) => singer.name),
      };
    });
}

/** The notes from one pitch to another by name: all of them while they are few, else the two ends. */
function noteNames(from: number, to: number): string {
  const notes = Array.from({ length: to - from + 1 }, (_, index) => pitchName(from + index));
  return notes.length <= 3 ? notes.join(", ") : `${pitchName(from)} to ${pitchName(to)}`;
}

const NUMERALS = [
  "No",
  "One",
  "Two",
  "Three",
  "Four",
  "Five",
  "Six",
  "Seven",
  "Eight",
  "Nine",
  "Ten",
  "Eleven",
  "Twelve",
];

const semitones = (count: number) =>
  `${NUMERALS[count] ?? String(count)} semitone${count === 1 ? "" : "s"}`;

/** What is missing at one end of the voice: how much, which notes, and in which numbers. */
export type Missing = { end: "top" | "bottom"; amount: string; notes: string; titles: string[] };

/** What a singer misses of a role, top first; empty when every note is in range. */
export function missingNotes(fit: Pick<FitDetail, "singer" | "whole" | "numbers">): Missing[] {
  const range = fit.singer.ranges.best;
  if (!range) return [];
  const missing: Missing[] = [];
  const { shortAbove, shortBelow } = fit.whole;
  if (shortAbove > 0) {
    missing.push({
      end: "top",
      amount: semitones(shortAbove),
      notes: noteNames(range.high + 1, range.high + shortAbove),
      titles: fit.numbers.filter((n) => n.fit.shortAbove > 0).map((n) => n.title),
    });
  }
  if (shortBelow > 0) {
    missing.push({
      end: "bottom",
      amount: semitones(shortBelow),
      notes: noteNames(range.low - shortBelow, range.low - 1),
      titles: fit.numbers.filter((n) => n.fit.shortBelow > 0).map((n) => n.title),
    });
  }
  return missing;
}

/** A share of the sung time in words: "3 %", "less than 1 %". */
export function shareInWords(share: number): string {
  const percent = share * 100;
  return percent < 1 ? "less than 1%" : `${String(Math.round(percent))}%`;
}
