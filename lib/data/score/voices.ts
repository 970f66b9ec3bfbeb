import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import type { Db, Tx } from "@/db/client";
import { numbers, roles, vocalLines } from "@/db/schema";
import { groupBy } from "@/lib/group-by";
import { mergeLines } from "@/lib/music/merge-lines";
import type { VocalLine } from "@/lib/music/types";
import type { Actor } from "@/lib/permissions/types";
import { productionFor } from "../guard";

export type RoleVoice = {
  id: string;
  name: string;
  kind: (typeof roles.$inferSelect)["kind"];
  needed: number;
  covers: number;
  /** Over all its numbers; null while it has no line. */
  line: VocalLine | null;
  /** In running order; several lines of one number are one. */
  perNumber: { numberId: string; label: string; title: string; line: VocalLine }[];
};

/** What each role sings, in all and number by number, for whoever may read the score. */
export async function roleVoices(actor: Actor, productionId: string): Promise<RoleVoice[]> {
  const scope = await productionFor(actor, productionId, "score:read");
  return roleVoicesIn(db, scope.id);
}

/** The same, asking no permission: for callers that have asked for their own. */
export async function roleVoicesIn(tx: Db | Tx, productionId: string): Promise<RoleVoice[]> {
  const [roleRows, lines] = await Promise.all([
    tx
      .select({
        id: roles.id,
        name: roles.name,
        kind: roles.kind,
        needed: roles.needed,
        covers: roles.covers,
      })
      .from(roles)
      .where(and(eq(roles.productionId, productionId), isNull(roles.removedAt)))
      .orderBy(asc(roles.place), asc(roles.id)),
    tx
      .select({
        roleId: vocalLines.roleId,
        numberId: numbers.id,
        label: numbers.label,
        title: numbers.title,
        low: vocalLines.low,
        high: vocalLines.high,
        optionalLow: vocalLines.optionalLow,
        optionalHigh: vocalLines.optionalHigh,
        histogram: vocalLines.histogram,
      })
      .from(vocalLines)
      .innerJoin(numbers, and(eq(numbers.id, vocalLines.numberId), isNull(numbers.removedAt)))
      .where(eq(numbers.productionId, productionId))
      .orderBy(asc(numbers.place), asc(numbers.id)),
  ]);
  const byRole = groupBy(lines, (line) => line.roleId);
  return roleRows.map((role) => {
    const perNumber = [
      ...groupBy(byRole.get(role.id) ?? [], (line) => line.numberId).values(),
    ].flatMap((own) => {
      const [first] = own;
      const line = mergeLines(own.map(toVocalLine));
      return first && line
        ? [{ numberId: first.numberId, label: first.label, title: first.title, line }]
        : [];
    });
    return { ...role, line: mergeLines(perNumber.map((each) => each.line)), perNumber };
  });
}

type LineColumns = Pick<
  typeof vocalLines.$inferSelect,
  "low" | "high" | "optionalLow" | "optionalHigh" | "histogram"
>;

/** A row as the arithmetic takes it. */
export function toVocalLine(row: LineColumns): VocalLine {
  return {
    low: row.low,
    high: row.high,
    optionalLow: row.optionalLow ?? undefined,
    optionalHigh: row.optionalHigh ?? undefined,
    histogram: row.histogram ?? undefined,
  };
}

export type NumberSung = {
  id: string;
  label: string;
  title: string;
  keyName: string | null;
  keyFifths: number | null;
  metre: string | null;
  tempo: number | null;
  bars: number | null;
  seconds: number | null;
  /** The roles that sing in it, in their order. */
  roleIds: string[];
};

/** The numbers in running order with who sings in each, for whoever may read the score. */
export async function numbersOf(actor: Actor, productionId: string): Promise<NumberSung[]> {
  const scope = await productionFor(actor, productionId, "score:read");
  return numbersIn(db, scope.id);
}

/** The same, asking no permission: for callers that have asked for their own. */
export async function numbersIn(tx: Db | Tx, productionId: string): Promise<NumberSung[]> {
  const [numberRows, sung] = await Promise.all([
    tx
      .select({
        id: numbers.id,
        label: numbers.label,
        title: numbers.title,
        keyName: numbers.keyName,
        keyFifths: numbers.keyFifths,
        metre: numbers.metre,
        tempo: numbers.tempo,
        bars: numbers.bars,
        seconds: numbers.seconds,
      })
      .from(numbers)
      .where(and(eq(numbers.productionId, productionId), isNull(numbers.removedAt)))
      .orderBy(asc(numbers.place), asc(numbers.id)),
    tx
      .selectDistinct({ numberId: vocalLines.numberId, roleId: roles.id, place: roles.place })
      .from(vocalLines)
      .innerJoin(roles, and(eq(roles.id, vocalLines.roleId), isNull(roles.removedAt)))
      .where(eq(roles.productionId, productionId))
      .orderBy(asc(roles.place), asc(roles.id)),
  ]);
  const byNumber = groupBy(sung, (row) => row.numberId);
  return numberRows.map((row) => ({
    ...row,
    roleIds: (byNumber.get(row.id) ?? []).map((each) => each.roleId),
  }));
}
