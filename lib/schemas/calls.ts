import { z } from "zod";
import { BLOCK_KINDS, CALL_KINDS } from "@/lib/calls/call-kinds";
import { idField, localDateField, localTimeField, optionalText, requiredText } from "./common";

/** A choice that may be left open: an empty field is null. */
const optionalId = z
  .union([z.literal(""), idField])
  .nullish()
  .transform((id) => (id === undefined || id === null || id === "" ? null : id));

/** Names a block while the call is being made: its id once it is saved. */
const blockKey = z.string().min(1).max(40);

const blockSchema = z
  .object({
    key: blockKey,
    kind: z.enum(BLOCK_KINDS),
    minutes: z.coerce
      .number({ error: "Write a number of minutes." })
      .int("Write whole minutes.")
      .min(1, "At least 1 minute.")
      .max(720, "At most 720 minutes."),
    numberId: optionalId,
    title: optionalText(160),
    bars: optionalText(40),
    detail: optionalText(200),
  })
  .refine((block) => block.kind !== "number" || block.numberId !== null, {
    path: ["numberId"],
    error: "Choose a number from the score.",
  });

const handSchema = z.object({
  personId: idField,
  act: z.enum(["call", "excuse"]),
  reason: requiredText("a reason", 200),
  /** The blocks it is about; none: the whole call. */
  keys: z.array(blockKey).max(60).default([]),
});

const MOST_MINUTES = 24 * 60;

const draftShape = {
  productionId: idField,
  kind: z.enum(CALL_KINDS, { error: "Choose a kind of call." }),
  title: optionalText(160),
  localDate: localDateField,
  localTime: localTimeField,
  roomId: optionalId,
  leaderId: optionalId,
  pianistId: optionalId,
  blocks: z
    .array(blockSchema)
    .min(1, "Add at least one block: a number, a scene or a warm-up.")
    .max(60, "At most 60 blocks in one call.")
    .refine(
      (blocks) => new Set(blocks.map((block) => block.key)).size === blocks.length,
      "The same block is there twice. Take one out.",
    )
    .refine(
      (blocks) => blocks.reduce((sum, block) => sum + block.minutes, 0) <= MOST_MINUTES,
      "A call cannot be longer than a day. Shorten it, or make two.",
    ),
  hand: z.array(handSchema).max(400).default([]),
};

export const createCallSchema = z.object(draftShape);

export const changeCallSchema = z.object({
  ...draftShape,
  callId: idField,
  version: z.coerce.number().int(),
});

/** A call as it stands in the form, saved before or not. */
export const checkCallSchema = z.object({
  ...draftShape,
  callId: idField.nullish().transform((id) => id ?? null),
});

export type CallDraft = z.output<typeof createCallSchema>;

const seenCall = { productionId: idField, callId: idField, version: z.coerce.number().int() };

export const publishCallSchema = z.object({
  ...seenCall,
  /** The clashes of people were shown and it goes out all the same. */
  despite: z.boolean().default(false),
});

export const seenCallSchema = z.object(seenCall);

export const restoreCallSchema = z.object({ ...seenCall, to: z.enum(["draft", "published"]) });

export const decideConflictSchema = z.object({
  productionId: idField,
  conflictId: idField,
  state: z.enum(["asked", "agreed", "declined"]),
});

/** Where a call is found in an address. */
export const callAddressSchema = z.object({ productionId: idField, callId: idField });
