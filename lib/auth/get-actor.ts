import "server-only";
import { redirect } from "next/navigation";
import { cache } from "react";
import { loadActor } from "@/lib/data/actor";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { currentUserId } from "./current-user";

/** Who is asking, or null: once per request. */
export const getActor = cache(async (): Promise<Actor | null> => {
  const userId = await currentUserId();
  return userId ? loadActor(userId) : null;
});

/** For pages: who is asking; someone not signed in is sent to sign in and comes back to `from` after. */
export async function pageActor(from: string): Promise<Actor> {
  const actor = await getActor();
  if (!actor) redirect(`/sign-in?to=${encodeURIComponent(from)}`);
  return actor;
}

/** For actions and route handlers: who is asking. Throws `signed-out`. */
export async function requireActor(): Promise<Actor> {
  const actor = await getActor();
  if (!actor) throw new AppError("signed-out");
  return actor;
}
