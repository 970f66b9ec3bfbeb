import "server-only";
import { unstable_rethrow } from "next/navigation";
import type { z } from "zod";
import { AppError, asAppError } from "@/lib/errors";
import type { ActionError, ActionResult } from "@/lib/errors";
import type { Actor } from "@/lib/permissions/types";
import { faultOf } from "@/lib/services/fault";
import { log } from "@/lib/services/log";
import { requireActor } from "./get-actor";

type Schema = z.ZodType;

/**
 * Makes a server action: parses the input, identifies the actor, runs (the data function permits), and gives back a
 * result, never an exception. Next accepts actions only from our own origin.
 */
export function defineAction<S extends Schema, T>(
  options: { input: S },
  run: (input: z.output<S>, actor: Actor) => Promise<T>,
): (raw: z.input<S>) => Promise<ActionResult<T>> {
  return (raw) =>
    answer(async () => {
      // Who is asking comes first: nobody learns from an action what its input should be.
      const actor = await requireActor();
      return run(parse(options.input, raw), actor);
    });
}

/** The same for what needs no sign-in (signing in itself, answering by a link): the run function limits and checks. */
export function definePublicAction<S extends Schema, T>(
  options: { input: S },
  run: (input: z.output<S>) => Promise<T>,
): (raw: z.input<S>) => Promise<ActionResult<T>> {
  return (raw) => answer(() => run(parse(options.input, raw)));
}

function parse<S extends Schema>(schema: S, raw: unknown): z.output<S> {
  const parsed = schema.safeParse(raw);
  if (parsed.success) return parsed.data;
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues) fields[issue.path.join(".") || "form"] ??= issue.message;
  throw new AppError("invalid", undefined, { fields });
}

async function answer<T>(work: () => Promise<T>): Promise<ActionResult<T>> {
  try {
    return { ok: true, data: await work() };
  } catch (error) {
    // redirect() and notFound() travel as exceptions of Next's own.
    unstable_rethrow(error);
    return { ok: false, error: describeError(error) };
  }
}

/** What the reader may know of an error; anything unforeseen is logged and shown as a fault. */
export function describeError(error: unknown): ActionError {
  const known = asAppError(error);
  if (known) {
    return {
      code: known.code,
      message: known.message,
      ...(known.fields ? { fields: known.fields } : {}),
    };
  }
  log.error({ err: faultOf(error) }, "fault");
  return {
    code: "fault",
    message: "Something went wrong on our side. Nothing you typed is lost: try again in a moment.",
  };
}
