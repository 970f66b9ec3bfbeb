import "server-only";
import { inArray } from "drizzle-orm";
import { db } from "@/db/client";
import { productions } from "@/db/schema";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import type { Interval } from "@/lib/schedule/types";
import { listProductions } from "./productions";
import { readClashes } from "./season/clashes";
import { readEvents } from "./season/events";
import { readProgress } from "./season/progress";
import type {
  OwnElsewhere,
  SeasonClash,
  SeasonEvent,
  SeasonProduction,
  SeasonProgress,
} from "./season/types";

export type Season = {
  productions: SeasonProduction[];
  events: SeasonEvent[];
  clashes: SeasonClash[];
  /** What the actor does in productions they do not run. */
  elsewhere: OwnElsewhere[];
  progress: SeasonProgress[];
};

/**
 * Everything the actor works in between two instants, over all their companies: productions whose calls they may read,
 * what happens when, the clashes among it, and what each production still needs. Each part holds only what the actor's
 * position in that very production shows them.
 */
export async function readSeason(actor: Actor, window: Interval): Promise<Season> {
  const seen = await listSeasonProductions(actor);
  const personIn = new Map(actor.people.map((person) => [person.companyId, person.id]));
  const own = new Map(seen.flatMap((p) => (p.leads ? [[p.id, personIn.get(p.companyId)]] : [])));
  const { events, held } =
    seen.length === 0
      ? { events: [], held: [] }
      : await readEvents(seen, window, (productionId) => own.get(productionId));
  const [{ clashes, elsewhere }, progress] = await Promise.all([
    readClashes({ actor, productions: seen, events, held, window }),
    readProgress(seen),
  ]);
  return { productions: seen, events, clashes, elsewhere, progress };
}

/** The productions whose calls the actor may read, each with what else of it they may see. */
export async function listSeasonProductions(actor: Actor): Promise<SeasonProduction[]> {
  const listed = (await listProductions(actor)).filter((p) =>
    can(actor, "calls:read", { companyId: p.companyId, productionId: p.id }),
  );
  if (listed.length === 0) return [];
  const published = new Map(
    (
      await db
        .select({ id: productions.id, at: productions.castPublishedAt })
        .from(productions)
        .where(
          inArray(
            productions.id,
            listed.map((p) => p.id),
          ),
        )
    ).map((row) => [row.id, row.at !== null]),
  );
  return listed.map((production) => {
    const castPublished = published.get(production.id) ?? false;
    const subject = { companyId: production.companyId, productionId: production.id, castPublished };
    return {
      ...production,
      castPublished,
      leads: can(actor, "production:change", subject),
      plans: can(actor, "calls:change", subject),
      sees: {
        score: can(actor, "score:read", subject),
        auditions: can(actor, "auditions:read", subject),
        callbacks: can(actor, "callbacks:read", subject),
        casting: can(actor, "casting:see", subject),
        conflicts: can(actor, "conflicts:read", subject),
      },
    };
  });
}
