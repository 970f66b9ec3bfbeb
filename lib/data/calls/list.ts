import "server-only";
import { addDays, format, parseISO } from "date-fns";
import { and, between, eq, sql } from "drizzle-orm";
import { db } from "@/db/client";
import { calls } from "@/db/schema";
import { calledTo } from "@/lib/calls/attending-runs";
import { findCallClashes } from "@/lib/calls/find-call-clashes";
import { productionFor } from "@/lib/data/guard";
import { can } from "@/lib/permissions/can";
import type { Actor } from "@/lib/permissions/types";
import { readFacts } from "./facts";
import { planSeen, seesCast } from "./hidden";
import { readScoreAndCast } from "./needed";
import { savedCalls, savedPlans } from "./saved";
import type { SavedCall } from "./saved";

export type CallListed = Pick<
  SavedCall,
  | "id"
  | "kind"
  | "title"
  | "state"
  | "localDate"
  | "zone"
  | "startsAt"
  | "endsAt"
  | "room"
  | "leader"
  | "pianist"
> & {
  /** What is worked on, in order. */
  what: { label: string | null; title: string }[];
  /** How many are called, as far as the reader may know. */
  people: number;
  /** What it clashes with; null for readers who do not plan. */
  clashes: number | null;
};

export type CallsOfWeek = {
  calls: CallListed[];
  /** Whether the production has any call at all the reader may see. */
  any: boolean;
  mayChange: boolean;
  locale: string;
  zone: string;
};

/** The calls of the seven local days from `monday`. Drafts and cancelled calls are seen only by those who plan. */
export async function listCallsOfWeek(
  actor: Actor,
  { productionId, monday }: { productionId: string; monday: string },
): Promise<CallsOfWeek> {
  const scope = await productionFor(actor, productionId, "calls:read");
  const mayChange = can(actor, "calls:change", {
    companyId: scope.companyId,
    productionId: scope.id,
  });
  const visible = mayChange ? undefined : eq(calls.state, "published");
  const sunday = format(addDays(parseISO(monday), 6), "yyyy-MM-dd");
  const [saved, score, [counted]] = await Promise.all([
    savedCalls(scope.id, and(between(calls.localDate, monday, sunday), visible)),
    readScoreAndCast(db, scope.id),
    db
      .select({ n: sql<number>`count(*)`.mapWith(Number) })
      .from(calls)
      .where(and(eq(calls.productionId, scope.id), visible)),
  ]);
  const castHidden = !seesCast(actor, scope);
  const whole = (await savedPlans(score, saved)).plans;
  const plans = new Map(
    saved.flatMap(({ id, state }) => {
      const plan = whole.get(id);
      return plan ? [[id, planSeen(plan, state, castHidden)] as const] : [];
    }),
  );
  const standing = saved
    .filter((call) => call.state !== "cancelled")
    .flatMap((call) => plans.get(call.id) ?? []);
  const facts =
    mayChange && standing.length > 0 ? await readFacts(scope, standing, { castHidden }) : null;
  return {
    any: (counted?.n ?? 0) > 0,
    mayChange,
    locale: scope.locale,
    zone: scope.zone,
    calls: saved.map((call) => {
      const plan = plans.get(call.id);
      const { id, kind, title, state, localDate, zone, startsAt, endsAt, room, leader, pianist } =
        call;
      return {
        id,
        kind,
        title,
        state,
        localDate,
        zone,
        startsAt,
        endsAt,
        room,
        leader,
        pianist,
        what: (plan?.blocks ?? [])
          .filter((block) => block.kind !== "break")
          .map((block) => ({ label: block.label, title: block.title })),
        people: new Set((plan?.blocks ?? []).flatMap(calledTo)).size,
        clashes:
          facts && plan && state !== "cancelled" ? findCallClashes(plan, facts).length : null,
      };
    }),
  };
}

/** The next published calls after a local day, on their own first day: what "tomorrow" on a call sheet is. */
export async function nextCalls(productionId: string, localDate: string): Promise<SavedCall[]> {
  const [next] = await db
    .select({ localDate: sql<string | null>`min(${calls.localDate})` })
    .from(calls)
    .where(
      and(
        eq(calls.productionId, productionId),
        eq(calls.state, "published"),
        sql`${calls.localDate} > ${localDate}`,
      ),
    );
  if (!next?.localDate) return [];
  return savedCalls(
    productionId,
    and(eq(calls.localDate, next.localDate), eq(calls.state, "published")),
  );
}
