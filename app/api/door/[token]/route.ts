import { definePublicRoute } from "@/lib/auth/define-route";
import { sourceOf } from "@/lib/auth/source-of";
import { readDoor } from "@/lib/data/auditions/door";

/** The running order behind a monitor's link, read again every few seconds. */
export const GET = definePublicRoute<{ token: string }>((request, { token }) =>
  readDoor(token, sourceOf(request.headers)),
);
