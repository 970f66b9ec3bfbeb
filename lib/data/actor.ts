import "server-only";
import { and, eq, isNull } from "drizzle-orm";
import { db } from "@/db/client";
import { people, positions, users } from "@/db/schema";
import type { Actor } from "@/lib/permissions/types";

/** The actor of a login: name, records in companies, open positions. Null when the login is gone. */
export async function loadActor(userId: string): Promise<Actor | null> {
  const rows = await db
    .select({
      email: users.email,
      name: users.name,
      personId: people.id,
      personName: people.name,
      companyId: people.companyId,
      kind: positions.kind,
      productionId: positions.productionId,
      positionId: positions.id,
    })
    .from(users)
    .leftJoin(people, and(eq(people.userId, users.id), isNull(people.removedAt)))
    .leftJoin(positions, and(eq(positions.personId, people.id), isNull(positions.endedAt)))
    .where(eq(users.id, userId));
  const first = rows[0];
  if (!first) return null;
  const known = new Map<string, { id: string; companyId: string }>();
  const held: Actor["positions"] = [];
  for (const row of rows) {
    if (row.personId === null || row.companyId === null) continue;
    known.set(row.personId, { id: row.personId, companyId: row.companyId });
    if (row.kind !== null) {
      held.push({
        kind: row.kind,
        companyId: row.companyId,
        productionId: row.productionId,
        personId: row.personId,
      });
    }
  }
  return {
    userId,
    email: first.email,
    name: first.name ?? first.personName ?? first.email,
    people: [...known.values()],
    positions: held,
  };
}
