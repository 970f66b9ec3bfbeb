import "server-only";
import { and, asc, desc, eq, inArray, isNull } from "drizzle-orm";
import type { z } from "zod";
import { db } from "@/db/client";
import {
  callbackInvitations,
  callbackMarks,
  callbackRounds,
  choices,
  people,
  positions,
} from "@/db/schema";
import { productionFor } from "@/lib/data/guard";
import { rangesOf } from "@/lib/data/ranges";
import type { PersonRanges, RangeOnFile } from "@/lib/data/ranges";
import { AppError } from "@/lib/errors";
import { fitInWords } from "@/lib/music/fit-in-words";
import { rangeFit } from "@/lib/music/range-fit";
import { tessitura } from "@/lib/music/tessitura";
import type { PitchSpan, RangeFit } from "@/lib/music/types";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { fitSchema } from "@/lib/schemas/casting";
import { roleVoicesIn } from "../score/voices";
import { fitWords, toSingerRange } from "./fit-words";
import type { FitWords } from "./fit-words";

export type CastingRole = {
  id: string;
  name: string;
  kind: string;
  needed: number;
  line: (PitchSpan & { tessitura: PitchSpan | null }) | null;
};

export type CastingChoice = {
  state: "considered" | "cast";
  kind: (typeof choices.$inferSelect)["kind"];
  version: number;
};

export type CastingCell = FitWords & { choice: CastingChoice | null };

export type CastingSinger = {
  personId: string;
  name: string;
  minor: boolean;
  range: Omit<RangeOnFile, "at"> | null;
  /** Roles this singer is called back for. */
  calledBackFor: string[];
  answer: "yes" | "no" | null;
  /** By role id. */
  cells: Record<string, CastingCell>;
};

export type CastingGrid = {
  roles: CastingRole[];
  singers: CastingSinger[];
  castPublished: boolean;
  mayChoose: boolean;
  /** The company's, for the days of what was heard. */
  zone: string;
  locale: string;
};

/**
 * Each called-back or chosen singer against each role: the range fit computed here, on the server, with its words, and what
 * is chosen so far. For the music team and the table; for the stage manager once the cast is published.
 */
export async function readCastingGrid(actor: Actor, productionId: string): Promise<CastingGrid> {
  const scope = await productionFor(actor, productionId, "casting:see");
  const [voices, marked, chosen] = await Promise.all([
    roleVoicesIn(db, scope.id),
    db
      .select({
        personId: callbackMarks.personId,
        roleId: callbackMarks.roleId,
        roundId: callbackMarks.roundId,
      })
      .from(callbackMarks)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackMarks.roundId))
      .where(eq(callbackRounds.productionId, scope.id)),
    db
      .select({
        personId: choices.personId,
        roleId: choices.roleId,
        state: choices.state,
        kind: choices.kind,
        version: choices.version,
      })
      .from(choices)
      .where(eq(choices.productionId, scope.id)),
  ]);
  const ids = [...new Set([...marked.map((m) => m.personId), ...chosen.map((c) => c.personId)])];
  const [singerRows, ranges, answers] = await Promise.all([
    ids.length === 0
      ? []
      : db
          .select({ personId: people.id, name: people.name, minor: people.minor })
          .from(people)
          .where(and(inArray(people.id, ids), isNull(people.removedAt)))
          .orderBy(asc(people.name)),
    rangesOf(db, ids),
    db
      .select({ personId: callbackInvitations.personId, answer: callbackInvitations.answer })
      .from(callbackInvitations)
      .innerJoin(callbackRounds, eq(callbackRounds.id, callbackInvitations.roundId))
      .where(
        and(eq(callbackRounds.productionId, scope.id), isNull(callbackInvitations.supersededAt)),
      )
      // The newest round speaks first.
      .orderBy(desc(callbackInvitations.publishedAt)),
  ]);
  const grid = voices.map(({ id, name, kind, needed, line }): CastingRole => ({
    id,
    name,
    kind,
    needed,
    line: line && {
      low: line.low,
      high: line.high,
      tessitura: line.histogram ? tessitura(line.histogram) : null,
    },
  }));
  return {
    roles: grid,
    singers: singerRows.map((row) => {
      const best = ranges.get(row.personId)?.best ?? null;
      return {
        ...row,
        range: best && {
          low: best.low,
          high: best.high,
          comfortableLow: best.comfortableLow,
          comfortableHigh: best.comfortableHigh,
          kind: best.kind,
        },
        calledBackFor: [
          ...new Set(marked.filter((m) => m.personId === row.personId).map((m) => m.roleId)),
        ],
        answer: answers.find((a) => a.personId === row.personId)?.answer ?? null,
        cells: Object.fromEntries(
          voices.map((role) => {
            const choice = chosen.find((c) => c.personId === row.personId && c.roleId === role.id);
            return [
              role.id,
              {
                ...fitWords(best, role.line),
                choice: choice
                  ? { state: choice.state, kind: choice.kind, version: choice.version }
                  : null,
              },
            ];
          }),
        ),
      };
    }),
    castPublished: scope.castPublished,
    mayChoose: can(actor, "casting:choose", { companyId: scope.companyId, productionId: scope.id }),
    zone: scope.zone,
    locale: scope.locale,
  };
}

export type FitDetail = {
  singer: { name: string; minor: boolean; ranges: PersonRanges };
  role: { name: string };
  whole: RangeFit & { words: string };
  numbers: {
    numberId: string;
    label: string;
    title: string;
    line: PitchSpan;
    fit: RangeFit;
    words: string;
  }[];
};

/** One singer against one role, number by number: which numbers are the trouble and by how much. */
export async function computeFit(
  actor: Actor,
  input: z.output<typeof fitSchema>,
): Promise<FitDetail> {
  const scope = await productionFor(actor, input.productionId, "casting:see");
  const [voices, [person], ranges] = await Promise.all([
    roleVoicesIn(db, scope.id),
    db
      .select({ name: people.name, minor: people.minor })
      .from(people)
      // A singer of this production: whom another one of the company hears is not this one's business.
      .innerJoin(
        positions,
        and(
          eq(positions.personId, people.id),
          eq(positions.productionId, scope.id),
          eq(positions.kind, "actor"),
        ),
      )
      .where(
        and(
          eq(people.id, input.personId),
          eq(people.companyId, scope.companyId),
          isNull(people.removedAt),
        ),
      ),
    rangesOf(db, [input.personId]),
  ]);
  const role = voices.find((voice) => voice.id === input.roleId);
  if (!role || !person) throw new AppError("not-found");
  const { line } = role;
  const onFile = ranges.get(input.personId) ?? { claimed: null, heard: null, best: null };
  if (!line)
    throw new AppError(
      "refused",
      `${role.name} has no vocal line yet. Read a score or type the line in first.`,
    );
  if (!onFile.best)
    throw new AppError(
      "refused",
      `There is no range on file for ${person.name}. Hear one, or ask the singer to give it.`,
    );
  const singer = toSingerRange(onFile.best);
  const whole = rangeFit(singer, line);
  return {
    singer: { ...person, ranges: onFile },
    role: { name: role.name },
    whole: { ...whole, words: fitInWords(whole) },
    numbers: role.perNumber.map((each) => {
      const fit = rangeFit(singer, each.line);
      return {
        numberId: each.numberId,
        label: each.label,
        title: each.title,
        line: { low: each.line.low, high: each.line.high },
        fit,
        words: fitInWords(fit),
      };
    }),
  };
}
