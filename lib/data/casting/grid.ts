import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import { callbackInvitations, callbackMarks, callbackRounds, choices, numbers, people, roles, vocalLines } from "@/db/schema";
import { productionFor } from "@/lib/data/guard";
import { rangesOf } from "@/lib/data/ranges";
import type { PersonRanges, RangeOnFile } from "@/lib/data/ranges";
import { AppError } from "@/lib/errors";
import { groupBy } from "@/lib/group-by";
import { fitInWords } from "@/lib/music/fit-in-words";
import { mergeLines } from "@/lib/music/merge-lines";
import { rangeFit } from "@/lib/music/range-fit";
import { tessitura } from "@/lib/music/tessitura";
import type { FitVerdict, PitchSpan, RangeFit, SingerRange, VocalLine } from "@/lib/music/types";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { fitSchema } from "@/lib/schemas/casting";

export type CastingRole = { id: string; name: string; kind: string; needed: number; line: (PitchSpan & { tessitura: PitchSpan | null }) | null };

export type CastingChoice = { state: "considered" | "cast"; kind: (typeof choices.$inferSelect)["kind"]; version: number };

export type CastingCell = { verdict: FitVerdict; words: string; choice: CastingChoice | null } | { verdict: null; words: string; choice: CastingChoice | null };

export type CastingSinger = {
  personId: string;
  name: string;
  minor: boolean;
  range: RangeOnFile | null;
  /** Roles this singer is called back for. */
  calledBackFor: string[];
  answer: "yes" | "no" | null;
  /** By role id. */
  cells: Record<string, CastingCell>;
};

export type CastingGrid = { roles: CastingRole[]; singers: CastingSinger[]; castPublished: boolean; mayChoose: boolean };

/** A range on file as the arithmetic takes it. */
export function toSingerRange(range: RangeOnFile): SingerRange {
  return { low: range.low, high: range.high, comfortableLow: range.comfortableLow ?? undefined, comfortableHigh: range.comfortableHigh ?? undefined };
}

type LineRow = VocalLine & { roleId: string; numberId: string; label: string; title: string };

async function linesOf(productionId: string): Promise<LineRow[]> {
  const rows = await db
    .select({
      roleId: vocalLines.roleId, numberId: numbers.id, label: numbers.label, title: numbers.title, low: vocalLines.low, high: vocalLines.high,
      optionalLow: vocalLines.optionalLow, optionalHigh: vocalLines.optionalHigh, histogram: vocalLines.histogram,
    })
    .from(vocalLines)
    .innerJoin(numbers, and(eq(numbers.id, vocalLines.numberId), isNull(numbers.removedAt)))
    .where(eq(numbers.productionId, productionId))
    .orderBy(asc(numbers.place));
  return rows.map((row) => ({
    ...row,
    optionalLow: row.optionalLow ?? undefined,
    optionalHigh: row.optionalHigh ?? undefined,
    histogram: row.histogram ?? undefined,
  }));
}

/**
 * Each called-back or chosen singer against each role: the range fit computed here, on the server, with its words, and what
 * is chosen so far. For the music team and the table; for the stage manager once the cast is published.
 */
export async function readCastingGrid(actor: Actor, productionId: string): Promise<CastingGrid> {
  const scope = await productionFor(actor, productionId, "casting:see");
  const [roleRows, lines, marked, chosen] = await Promise.all([
    db.select({ id: roles.id, name: roles.name, kind: roles.kind, needed: roles.needed }).from(roles).where(and(eq(roles.productionId, scope.id), isNull(roles.removedAt))).orderBy(asc(roles.place)),
    linesOf(scope.id),
    db
      .select({ personId: callbackMarks.personId, roleId: callbackMarks.roleId, roundId: callbackMarks.roundId })
      .from(callbackMarks)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackMarks.roundId))
      .where(eq(callbackRounds.productionId, scope.id)),
    db
      .select({ personId: choices.personId, roleId: choices.roleId, state: choices.state, kind: choices.kind, version: choices.version })
      .from(choices)
      .where(eq(choices.productionId, scope.id)),
  ]);
  const ids = [...new Set([...marked.map((m) => m.personId), ...chosen.map((c) => c.personId)])];
  const [singerRows, ranges, answers] = await Promise.all([
    ids.length === 0 ? [] : db.select({ personId: people.id, name: people.name, minor: people.minor }).from(people).where(and(inArray(people.id, ids), isNull(people.removedAt))).orderBy(asc(people.name)),
    rangesOf(db, ids),
    db
      .select({ personId: callbackInvitations.personId, answer: callbackInvitations.answer })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .where(and(eq(callbackRounds.productionId, scope.id), isNull(callbackInvitations.supersededAt))),
  ]);
  const linesByRole = groupBy(lines, (line) => line.roleId);
  const whole = new Map(roleRows.map((role) => [role.id, mergeLines(linesByRole.get(role.id) ?? [])]));
  const grid = roleRows.map((role): CastingRole => {
    const line = whole.get(role.id) ?? null;
    return { ...role, line: line ? { low: line.low, high: line.high, tessitura: line.histogram ? tessitura(line.histogram) : null } : null };
  });
  return {
    roles: grid,
    singers: singerRows.map((row) => {
      const range = ranges.get(row.personId)?.best ?? null;
      return {
        ...row,
        range,
        calledBackFor: [...new Set(marked.filter((m) => m.personId === row.personId).map((m) => m.roleId))],
        answer: answers.find((a) => a.personId === row.personId)?.answer ?? null,
        cells: Object.fromEntries(
          roleRows.map((role) => {
            const choice = chosen.find((c) => c.personId === row.personId && c.roleId === role.id);
            return [role.id, cellOf(range, whole.get(role.id) ?? null, choice ? { state: choice.state, kind: choice.kind, version: choice.version } : null)];
          }),
        ),
      };
    }),
    castPublished: scope.castPublished,
    mayChoose: can(actor, "casting:choose", { companyId: scope.companyId, productionId: scope.id }),
  };
}

function cellOf(range: RangeOnFile | null, line: VocalLine | null, choice: CastingChoice | null): CastingCell {
  if (!line) return { verdict: null, words: "Role has no line yet", choice };
  if (!range) return { verdict: null, words: "No range on file", choice };
  const fit = rangeFit(toSingerRange(range), line);
  return { verdict: fit.verdict, words: fitInWords(fit), choice };
}

export type FitDetail = {
  singer: { name: string; minor: boolean; ranges: PersonRanges };
  role: { name: string };
  whole: RangeFit & { words: string };
  numbers: { numberId: string; label: string; title: string; line: PitchSpan; fit: RangeFit; words: string }[];
};

/** One singer against one role, number by number: which numbers are the trouble and by how much. */
export async function computeFit(actor: Actor, input: z.output<typeof fitSchema>): Promise<FitDetail> {
  const scope = await productionFor(actor, input.productionId, "casting:see");
  const [[role], [person], lines, ranges] = await Promise.all([
    db.select({ id: roles.id, name: roles.name }).from(roles).where(and(eq(roles.id, input.roleId), eq(roles.productionId, scope.id), isNull(roles.removedAt))),
    db.select({ name: people.name, minor: people.minor }).from(people).where(and(eq(people.id, input.personId), eq(people.companyId, scope.companyId), isNull(people.removedAt))),
    linesOf(scope.id),
    rangesOf(db, [input.personId]),
  ]);
  if (!role || !person) throw new AppError("not-found");
  const own = lines.filter((line) => line.roleId === role.id);
  const line = mergeLines(own);
  const onFile = ranges.get(input.personId) ?? { claimed: null, heard: null, best: null };
  if (!line) throw new AppError("refused", `${role.name} has no vocal line yet. Read a score or type the line in first.`);
  if (!onFile.best) throw new AppError("refused", `There is no range on file for ${person.name}. Hear one, or ask the singer to give it.`);
  const singer = toSingerRange(onFile.best);
  const whole = rangeFit(singer, line);
  return {
    singer: { ...person, ranges: onFile },
    role: { name: role.name },
    whole: { ...whole, words: fitInWords(whole) },
    numbers: own.map((each) => {
      const fit = rangeFit(singer, each);
      return { numberId: each.numberId, label: each.label, title: each.title, line: { low: each.low, high: each.high }, fit, words: fitInWords(fit) };
    }),
  };
}
