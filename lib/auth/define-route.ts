import "server-only";
import { unstable_rethrow } from "next/navigation";
import { asAppError } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { describeError } from "./define-action";
import { requireActor } from "./get-actor";
import { assertOwnOrigin } from "./own-origin";

type Context<P> = { params: Promise<P> };

/**
 * Makes a route handler for signed-in people: refuses writes from another origin, identifies the actor, runs, and answers
 * errors as `{error:{code,message}}` with their status. What `run` returns is sent as JSON unless it is a Response.
 */
export function defineRoute<P>(
  run: (request: Request, actor: Actor, params: P) => Promise<unknown>,
): (request: Request, context: Context<P>) => Promise<Response> {
  return async (request, context) => {
    try {
      assertOwnOrigin(request);
      const actor = await requireActor();
      return toResponse(await run(request, actor, await context.params));
    } catch (error) {
      unstable_rethrow(error);
      return errorResponse(error);
    }
  };
}

/** The same for routes that need no sign-in. */
export function definePublicRoute<P>(
  run: (request: Request, params: P) => Promise<unknown>,
): (request: Request, context: Context<P>) => Promise<Response> {
  return async (request, context) => {
    try {
      assertOwnOrigin(request);
      return toResponse(await run(request, await context.params));
    } catch (error) {
      unstable_rethrow(error);
      return errorResponse(error);
    }
  };
}

function toResponse(result: unknown): Response {
  if (result instanceof Response) return result;
  return Response.json(result, { headers: { "cache-control": "private, no-store" } });
}

/** An error as a JSON answer with its status; never a stack. */
export function errorResponse(error: unknown): Response {
  const described = describeError(error);
  const known = asAppError(error);
  const status = known?.status ?? 500;
  const headers = new Headers({ "cache-control": "no-store" });
  if (known?.retryAfter !== undefined) headers.set("retry-after", String(known.retryAfter));
  return Response.json({ error: described }, { status, headers });
}
