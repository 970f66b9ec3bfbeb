import "server-only";
import { and, asc, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { numbers, people, positions } from "@/db/schema";
import { productionFor } from "@/lib/data/guard";
import { groupBy } from "@/lib/group-by";
import { can } from "@/lib/permissions/can";
import { POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Actor } from "@/lib/permissions/types";
import { readRooms } from "./facts";
import { AT_THE_PIANO } from "./needed";

export type CallChoices = {
  production: { id: string; title: string; zone: string };
  numbers: { id: string; label: string; title: string; seconds: number | null }[];
  rooms: { id: string; name: string; venueName: string; hasPiano: boolean }[];
  /** Everyone with a position, who can be called by hand. */
  people: { id: string; name: string; position: string }[];
  /** Everyone but the singers. */
  leaders: { id: string; name: string }[];
  pianists: { id: string; name: string }[];
  mayAssignPianist: boolean;
};

/** What can be chosen while a call is being made: the score in order, the company's rooms, and the production's people. */
export async function readCallChoices(actor: Actor, productionId: string): Promise<CallChoices> {
  const scope = await productionFor(actor, productionId, "calls:change");
  const [numberRows, rooms, held] = await Promise.all([
    db
      .select({
        id: numbers.id,
        label: numbers.label,
        title: numbers.title,
        seconds: numbers.seconds,
      })
      .from(numbers)
      .where(and(eq(numbers.productionId, scope.id), isNull(numbers.removedAt)))
      .orderBy(asc(numbers.place)),
    readRooms(scope.companyId),
    db
      .select({ id: people.id, name: people.name, kind: positions.kind })
      .from(positions)
      .innerJoin(people, eq(people.id, positions.personId))
      .where(
        and(
          eq(positions.productionId, scope.id),
          isNull(positions.endedAt),
          isNull(people.removedAt),
        ),
      )
      .orderBy(asc(people.name)),
  ]);
  const each = [...groupBy(held, (row) => row.id).values()].flatMap((rows) => {
    const [first] = rows;
    return first ? [{ id: first.id, name: first.name, kinds: rows.map((row) => row.kind) }] : [];
  });
  const brief = ({ id, name }: { id: string; name: string }) => ({ id, name });
  return {
    production: { id: scope.id, title: scope.title, zone: scope.zone },
    numbers: numberRows,
    rooms: rooms.map(({ id, name, venueName, hasPiano }) => ({ id, name, venueName, hasPiano })),
    people: each.map(({ id, name, kinds }) => ({
      id,
      name,
      position: kinds.map((kind) => POSITION_NAMES[kind]).join(", "),
    })),
    leaders: each.filter(({ kinds }) => kinds.some((kind) => kind !== "actor")).map(brief),
    pianists: each
      .filter(({ kinds }) => AT_THE_PIANO.some((kind) => kinds.includes(kind)))
      .map(brief),
    mayAssignPianist: can(actor, "pianists:assign", {
      companyId: scope.companyId,
      productionId: scope.id,
    }),
  };
}
