import "server-only";
import { and, asc, eq, inArray } from "drizzle-orm";
import { db } from "@/db/client";
import { blocks, called } from "@/db/schema";
import { groupBy } from "@/lib/group-by";
import { blockTimes } from "@/lib/schedule/block-times";
import type { Interval } from "@/lib/schedule/types";

/**
 * When each called person is in these calls: their blocks, joined where they follow each other. Blocks lie back to back
 * from the start of the call. Of a call with `castHidden`, only those called by hand. Asks no permission: the caller has.
 */
export async function calledStretches(
  callRows: readonly { id: string; from: Date; castHidden?: boolean }[],
): Promise<(Interval & { callId: string; personId: string })[]> {
  const ids = callRows.map((call) => call.id);
  if (ids.length === 0) return [];
  const [blockRows, calledRows] = await Promise.all([
    db
      .select({ id: blocks.id, callId: blocks.callId, minutes: blocks.minutes })
      .from(blocks)
      .where(inArray(blocks.callId, ids))
      .orderBy(asc(blocks.callId), asc(blocks.place)),
    db
      .select({ blockId: called.blockId, personId: called.personId, source: called.source })
      .from(called)
      .innerJoin(blocks, eq(blocks.id, called.blockId))
      .where(and(inArray(blocks.callId, ids), eq(called.excused, false))),
  ]);
  const byCall = groupBy(blockRows, (row) => row.callId);
  const peopleOf = groupBy(calledRows, (row) => row.blockId);
  return callRows.flatMap((call) => {
    const open = new Map<string, Interval & { callId: string; personId: string }>();
    const done: (Interval & { callId: string; personId: string })[] = [];
    for (const block of blockTimes(call.from, byCall.get(call.id) ?? [])) {
      for (const { personId, source } of peopleOf.get(block.id) ?? []) {
        if (call.castHidden === true && source === "score") continue;
        const running = open.get(personId);
        if (running?.to.getTime() === block.from.getTime()) {
          running.to = block.to;
          continue;
        }
        const stretch = { callId: call.id, personId, from: block.from, to: block.to };
        open.set(personId, stretch);
        done.push(stretch);
      }
    }
    return done;
  });
}
