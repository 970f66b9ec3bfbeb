import "server-only";
import { countTry, RATES } from "@/lib/data/rate-limit";
import { userOfToken } from "@/lib/data/tokens";
import { asAppError } from "@/lib/errors";
import type { ErrorCode } from "@/lib/errors";
import { faultOf } from "@/lib/services/fault";
import { log } from "@/lib/services/log";
import { currentUserId } from "./current-user";
import { assertOwnOrigin } from "./own-origin";

/** A refusal of the public API: `area.reason`, words, and where in the request it is about. */
export class ApiError extends Error {
  readonly status: number;
  readonly code: string;
  readonly path: string | undefined;

  constructor(status: number, code: string, message: string, path?: string) {
    super(message);
    this.name = "ApiError";
    this.status = status;
    this.code = code;
    this.path = path;
  }
}

const REASONS: Record<ErrorCode, string> = {
  "signed-out": "auth.required",
  "not-found": "request.not-found",
  "not-allowed": "auth.not-allowed",
  invalid: "request.invalid",
  stale: "request.stale",
  taken: "request.taken",
  "too-many": "rate.too-many",
  "too-large": "request.too-large",
  "wrong-kind": "request.wrong-kind",
  refused: "request.refused",
};

/**
 * Makes a route of the public API: a personal token or the session cookie, a rate limit per login, JSON out, and errors as
 * `{error:{code:"area.reason", message, path?}}` with their status.
 */
export function defineApiRoute(
  run: (request: Request) => Promise<unknown>,
): (request: Request) => Promise<Response> {
  return async (request) => {
    try {
      const userId = await identify(request);
      await countTry(RATES.apiOfToken, userId);
      return Response.json(await run(request), {
        headers: { "cache-control": "private, no-store" },
      });
    } catch (error) {
      return refuse(error);
    }
  };
}

async function identify(request: Request): Promise<string> {
  const header = request.headers.get("authorization");
  if (header !== null) {
    const token = /^Bearer\s+(\S+)$/i.exec(header)?.[1];
    const userId = token === undefined ? null : await userOfToken(token);
    if (userId === null)
      throw new ApiError(
        401,
        "auth.token",
        "This token is not known or was revoked. Make a new one on the account page.",
      );
    return userId;
  }
  assertOwnOrigin(request);
  const userId = await currentUserId();
  if (userId === null)
    throw new ApiError(
      401,
      "auth.required",
      "Send a personal token as `Authorization: Bearer …`; make one on the account page.",
    );
  return userId;
}

function refuse(error: unknown): Response {
  if (error instanceof ApiError) {
    return answer(error.status, error.code, error.message, error.path);
  }
  const known = asAppError(error);
  if (known) {
    const response = answer(known.status, REASONS[known.code], known.message);
    if (known.retryAfter !== undefined)
      response.headers.set("retry-after", String(known.retryAfter));
    return response;
  }
  log.error({ err: faultOf(error) }, "fault");
  return answer(500, "server.fault", "Something went wrong on our side. Try again in a moment.");
}

function answer(status: number, code: string, message: string, path?: string): Response {
  const headers: Record<string, string> = { "cache-control": "no-store" };
  if (status === 401) headers["www-authenticate"] = 'Bearer realm="Cembalo"';
  return Response.json(
    { error: { code, message, ...(path === undefined ? {} : { path }) } },
    { status, headers },
  );
}
