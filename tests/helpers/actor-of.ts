import { loadActor } from "@/lib/data/actor";
import type { Actor } from "@/lib/permissions/types";

/** The actor of a login, as the session would give it. */
export async function actorOf(userId: string): Promise<Actor> {
  const actor = await loadActor(userId);
  if (!actor) throw new Error("no such login");
  return actor;
}
