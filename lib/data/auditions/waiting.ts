import "server-only";
import { and, asc, eq, inArray, isNull } from "drizzle-orm";
import type { Db, Tx } from "@/db/client";
import { people, signUps, slotAssignments } from "@/db/schema";

/** The production's sign-ups that have no slot on any day and still want one, in the order they were taken. Asks no permission. */
export async function listWaiting(tx: Db | Tx, productionId: string) {
  return tx
    .select({
      signUpId: signUps.id,
      version: signUps.version,
      personId: people.id,
      name: people.name,
      pronouns: people.pronouns,
      minor: people.minor,
      state: signUps.state,
      place: signUps.place,
      song: signUps.song,
      bars: signUps.bars,
      asksFor: signUps.asksFor,
      notBefore: signUps.notBefore,
      notAfter: signUps.notAfter,
    })
    .from(signUps)
    .innerJoin(people, eq(people.id, signUps.personId))
    .leftJoin(slotAssignments, eq(slotAssignments.signUpId, signUps.id))
    .where(
      and(
        eq(signUps.productionId, productionId),
        isNull(slotAssignments.slotId),
        inArray(signUps.state, ["listed", "invited", "confirmed"]),
      ),
    )
    .orderBy(asc(signUps.place));
}
