"use server";

import { headers } from "next/headers";
import { definePublicAction } from "@/lib/auth/define-action";
import { sourceOf } from "@/lib/auth/source-of";
import * as doorData from "@/lib/data/auditions/door";
import { doorActSchema } from "@/lib/schemas/auditions";

/** What the monitor's big buttons do; the link's token is what permits it. */
export const actAtDoor = definePublicAction({ input: doorActSchema }, async (input) => {
  await doorData.actAtDoor(input, sourceOf(await headers()));
});
