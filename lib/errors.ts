/** What can go wrong on purpose. Anything else is a fault, logged and shown as "something went wrong". */
export type ErrorCode =
  | "signed-out"
  | "not-found"
  | "not-allowed"
  | "invalid"
  | "stale"
  | "taken"
  | "too-many"
  | "too-large"
  | "wrong-kind"
  | "refused";

const STATUS: Record<ErrorCode, number> = {
  "signed-out": 401,
  "not-found": 404,
  "not-allowed": 403,
  invalid: 400,
  stale: 409,
  taken: 409,
  "too-many": 429,
  "too-large": 413,
  "wrong-kind": 415,
  refused: 422,
};

const PLAIN: Record<ErrorCode, string> = {
  "signed-out": "Sign in to go on. What you typed is still here.",
  "not-found": "That is not here. It may have been removed, or the link is not for you.",
  "not-allowed": "Your position in this production does not include that. Ask its music director.",
  invalid: "Something in the form needs another look.",
  stale: "Someone changed this while you were looking. Load it again and repeat your change.",
  taken: "That is already taken.",
  "too-many": "That was tried too often. Wait a few minutes and try again.",
  "too-large": "That file is too large.",
  "wrong-kind": "That kind of file cannot be read here.",
  refused: "That cannot be done as it stands.",
};

export type ErrorExtras = {
  /** Messages by form field, shown beside the field. */
  fields?: Record<string, string>;
  /** Seconds to wait, for `too-many`. */
  retryAfter?: number;
};

/** An error whose message may be shown to the person: it says what happened and what to do next. */
export class AppError extends Error {
  readonly code: ErrorCode;
  readonly fields: Record<string, string> | undefined;
  readonly retryAfter: number | undefined;

  constructor(code: ErrorCode, message?: string, extras: ErrorExtras = {}) {
    super(message ?? PLAIN[code]);
    this.name = "AppError";
    this.code = code;
    this.fields = extras.fields;
    this.retryAfter = extras.retryAfter;
  }

  /** The HTTP status a route answers with for this error. */
  get status(): number {
    return STATUS[this.code];
  }
}

export type ActionError = {
  code: ErrorCode | "fault";
  message: string;
  fields?: Record<string, string>;
};

/** What every server action returns: never a thrown error, always one of these two. */
export type ActionResult<T> = { ok: true; data: T } | { ok: false; error: ActionError };

/** An error as one of ours where it is one: a malformed id counts as an id that does not exist. */
export function asAppError(error: unknown): AppError | null {
  if (error instanceof AppError) return error;
  for (const candidate of [error, error instanceof Error ? error.cause : null]) {
    if (candidate instanceof Error && candidate.name === "NotAnIdError")
      return new AppError("not-found");
  }
  return null;
}
