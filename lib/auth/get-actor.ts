import "server-only";
import { headers } from "next/headers";
import { redirect } from "next/navigation";
import { cache } from "react";
import { loadActor } from "@/lib/data/actor";
import { AppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { ASKED_FOR } from "./asked-for";
import { currentUserId } from "./current-user";

/** Who is asking, or null: once per request. */
export const getActor = cache(async (): Promise<Actor | null> => {
  const userId = await currentUserId();
  return userId ? loadActor(userId) : null;
});

/** For pages: who is asking; someone not signed in is sent to sign in and comes back to what they asked for, or to `from`. */
export async function pageActor(from: string): Promise<Actor> {
  const actor = await getActor();
  if (actor) return actor;
  const to = (await headers()).get(ASKED_FOR) ?? from;
  redirect(`/sign-in?to=${encodeURIComponent(to)}`);
}

/** For actions and route handlers: who is asking. Throws `signed-out`. */
export async function requireActor(): Promise<Actor> {
  const actor = await getActor();
  if (!actor) throw new AppError("signed-out");
  return actor;
}
