import "server-only";
import { DrizzleQueryError } from "drizzle-orm";

export type Fault = { type: string; message: string; code?: string; stack?: string };

/**
 * An unforeseen error as the log keeps it. A failed query's message and stack carry the values that were sent (addresses,
 * secrets of links and sessions): of such a one only the statement, the database's code and the frames are kept.
 */
export function faultOf(error: unknown): Fault {
  if (!(error instanceof Error)) return { type: "unknown", message: typeof error };
  const stack = (error.stack ?? "")
    .split("\n")
    .filter((line) => /^\s+at /.test(line))
    .join("\n");
  if (error instanceof DrizzleQueryError) {
    return {
      type: "DrizzleQueryError",
      message: error.query,
      code: codeOf(error.cause) ?? "unknown",
      stack,
    };
  }
  // The database's own messages quote values, too: "Duplicate entry '…' for key".
  const code = "sqlMessage" in error ? codeOf(error) : undefined;
  if (code !== undefined) return { type: error.name, message: code, code, stack };
  return { type: error.name, message: error.message, stack };
}

/** The code of an error of the database, the network or the mail server, such as "ER_DUP_ENTRY" or "ECONNREFUSED". */
export function codeOf(error: unknown): string | undefined {
  return error instanceof Error && "code" in error && typeof error.code === "string"
    ? error.code
    : undefined;
}
