import type { EventKind } from "@/components/schedule/note-shape";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { SeasonEvent, SeasonEventKind } from "@/lib/data/season/types";

/** What an event is, as the head of a line. */
export function eventName(kind: SeasonEventKind): string {
  if (kind === "audition") return "Auditions";
  if (kind === "callback") return "Callbacks";
  return CALL_KIND_NAMES[kind];
}

const IN_A_SENTENCE: Record<SeasonEventKind, string> = {
  audition: "the auditions",
  callback: "the callbacks",
  music: "a music call",
  staging: "a staging call",
  choreography: "a choreography call",
  orchestra: "a band call",
  sitzprobe: "the sitzprobe",
  wandelprobe: "the wandelprobe",
  tech: "a tech call",
  dress: "a dress rehearsal",
  put_in: "a put-in",
  brush_up: "a brush-up",
  performance: "a performance",
};

/** What an event is, inside a sentence: "a music call". */
export function eventInSentence(kind: SeasonEventKind): string {
  return IN_A_SENTENCE[kind];
}

const SHAPES: Record<SeasonEventKind, EventKind> = {
  audition: "audition",
  callback: "callback",
  music: "music",
  staging: "staging",
  choreography: "staging",
  put_in: "staging",
  brush_up: "staging",
  orchestra: "orchestra",
  sitzprobe: "orchestra",
  wandelprobe: "orchestra",
  tech: "tech",
  dress: "tech",
  performance: "performance",
};

/** The notehead an event is drawn with. */
export function eventShape(kind: SeasonEventKind): EventKind {
  return SHAPES[kind];
}

/** Where an event is looked at and changed. */
export function eventHref(event: Pick<SeasonEvent, "id" | "kind" | "productionId">): string {
  const production = `/productions/${event.productionId}`;
  if (event.kind === "audition") return `${production}/auditions/${event.id}`;
  if (event.kind === "callback") return `${production}/callbacks`;
  return `${production}/rehearsals/${event.id}`;
}
