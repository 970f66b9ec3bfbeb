import "server-only";
import pino from "pino";
import { env } from "@/lib/env";

/**
 * The server's log: one JSON line an event, ids instead of people. Anything that could name a person is cut out
 * even if a call passes it by mistake.
 */
export const log = pino({
  level: env().LOG_LEVEL,
  base: null,
  redact: {
    paths: [
      "email",
      "name",
      "phone",
      "to",
      "password",
      "token",
      "*.email",
      "*.name",
      "*.phone",
      "*.to",
      "*.password",
      "*.token",
    ],
    censor: "[kept out]",
  },
});
