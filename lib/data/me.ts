import "server-only";
import { asc, eq, inArray } from "drizzle-orm";
import { db } from "@/db/client";
import { companies, people } from "@/db/schema";
import type { Actor } from "@/lib/permissions/types";
import { rangesOf } from "./ranges";
import type { PersonRanges } from "./ranges";

export type OwnRecord = {
  personId: string;
  company: string;
  zone: string;
  locale: string;
  /** Whether they hold an open position of an actor there. */
  sings: boolean;
  ranges: PersonRanges;
};

/** The records that companies have of the actor, with the ranges on file. */
export async function listOwnRecords(actor: Actor): Promise<OwnRecord[]> {
  const own = actor.people.map((p) => p.id);
  if (own.length === 0) return [];
  const [rows, ranges] = await Promise.all([
    db
      .select({
        personId: people.id,
        company: companies.name,
        zone: companies.zone,
        locale: companies.locale,
      })
      .from(people)
      .innerJoin(companies, eq(companies.id, people.companyId))
      .where(inArray(people.id, own))
      .orderBy(asc(companies.name)),
    rangesOf(db, own),
  ]);
  return rows.map((row) => ({
    ...row,
    sings: actor.positions.some((p) => p.kind === "actor" && p.personId === row.personId),
    ranges: ranges.get(row.personId) ?? { claimed: null, heard: null, best: null },
  }));
}
