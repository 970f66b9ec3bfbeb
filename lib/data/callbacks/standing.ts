import "server-only";
import { and, eq, isNull, ne } from "drizzle-orm";
import type { Db, Tx } from "@/db/client";
import { callbackInvitations, callbackMarks, roles, signUps } from "@/db/schema";
import type { CallbackSnapshot } from "@/db/schema/callbacks";
import { groupBy } from "@/lib/group-by";
import type { Round } from "./round";

export type PublishedCount = { told: number; unchanged: number; takenOff: number };

/** What publishing now would do for one person: send a first word, a changed one, nothing, or take them off. */
export type Unsent = "new" | "changed" | "off" | "none";

export type StandingInvitation = {
  id: string;
  personId: string;
  snapshot: CallbackSnapshot;
  answer: "yes" | "no" | null;
};

/** What each marked person would be sent now, by person. Someone who withdrew from the auditions is sent nothing. */
export async function wantedSnapshots(
  tx: Db | Tx,
  productionId: string,
  round: Round,
): Promise<Map<string, CallbackSnapshot>> {
  const rows = await tx
    .select({ personId: callbackMarks.personId, role: roles.name })
    .from(callbackMarks)
    .innerJoin(roles, and(eq(roles.id, callbackMarks.roleId), isNull(roles.removedAt)))
    .innerJoin(
      signUps,
      and(
        eq(signUps.personId, callbackMarks.personId),
        eq(signUps.productionId, productionId),
        ne(signUps.state, "withdrawn"),
      ),
    )
    .where(eq(callbackMarks.roundId, round.id))
    .orderBy(roles.place);
  const snapshots = new Map<string, CallbackSnapshot>();
  for (const [personId, marks] of groupBy(rows, (row) => row.personId)) {
    snapshots.set(personId, {
      round: round.title,
      roles: marks.map((mark) => mark.role),
      startsAt: round.startsAt?.toISOString() ?? null,
      endsAt: round.endsAt?.toISOString() ?? null,
      zone: round.zone,
      room: round.room,
      material: round.material,
    });
  }
  return snapshots;
}

/** What people were last sent of this round and still stands; `lock` keeps others from changing it meanwhile. */
export async function standingInvitations(
  tx: Db | Tx,
  roundId: string,
  lock = false,
): Promise<StandingInvitation[]> {
  const query = tx
    .select({
      id: callbackInvitations.id,
      personId: callbackInvitations.personId,
      snapshot: callbackInvitations.snapshot,
      answer: callbackInvitations.answer,
    })
    .from(callbackInvitations)
    .where(and(eq(callbackInvitations.roundId, roundId), isNull(callbackInvitations.supersededAt)));
  return lock ? query.for("update") : query;
}

/** For each person concerned, what publishing would change. */
export function compareWithSent(
  wanted: Map<string, CallbackSnapshot>,
  standing: readonly StandingInvitation[],
): Map<string, Unsent> {
  const changes = new Map<string, Unsent>([...wanted.keys()].map((personId) => [personId, "new"]));
  for (const { personId, snapshot } of standing) {
    const now = wanted.get(personId);
    // JSON comes back with its keys as written, so equal snapshots are equal text.
    changes.set(
      personId,
      !now ? "off" : JSON.stringify(now) === JSON.stringify(snapshot) ? "none" : "changed",
    );
  }
  return changes;
}

/** The same as the three numbers the button says before it is pressed. */
export function countChanges(changes: ReadonlyMap<string, Unsent>): PublishedCount {
  const count = (...kinds: Unsent[]) =>
    [...changes.values()].filter((change) => kinds.includes(change)).length;
  return { told: count("new", "changed"), unchanged: count("none"), takenOff: count("off") };
}
