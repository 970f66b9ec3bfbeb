import type { Season } from "@/lib/data/season";
import type { SeasonClash } from "@/lib/data/season/types";
import { eventInSentence } from "./event-words";

/** A sentence in which the titles of works stand apart, so that they can be set in italics. */
export type Words = readonly (string | { work: string })[];

export function asText(words: Words): string {
  return words.map((part) => (typeof part === "string" ? part : part.work)).join("");
}

/** Who clashes, where with what: one sentence. Of a production that is not the reader's it says "engaged". */
export function clashInWords(
  clash: SeasonClash,
  season: Pick<Season, "events" | "productions">,
): Words {
  const [first, second] = clash.eventIds.map((id) => eventOf(id, season));
  const one = first ?? ["a call"];
  const two = second ?? ["another"];
  const who = namesInWords(clash.who);
  const plural = clash.who.length > 1 || clash.who[0] === "You";
  const has = plural ? "have" : "has";
  switch (clash.kind) {
    case "room":
      return [`${who} is taken twice: by `, ...one, " and by ", ...two, "."];
    case "conflict":
      return [`${who} said that ${whom(clash)} cannot attend `, ...one, " then."];
    case "travel":
      return [
        `${who} ${has} ${String(clash.short ?? 0)} min too little for the way from `,
        ...one,
        " to ",
        ...two,
        ".",
      ];
    case "person":
    case "pianist":
      if (clash.elsewhere) {
        return [
          `${who} ${has} to be at `,
          ...one,
          ` and ${plural ? "are" : "is"} engaged elsewhere.`,
        ];
      }
      return [`${who} ${has} to be at `, ...one, " and at ", ...two, "."];
  }
}

/** What can be done about it. */
export function clashAdvice(clash: SeasonClash): string {
  const them = clash.who.length === 1 && clash.who[0] === "You" ? "yourself" : "them";
  switch (clash.kind) {
    case "room":
      return "Move one of the two to another room or time.";
    case "conflict":
      return `Move the call, or let ${them} off.`;
    case "travel":
      return "Begin the later one later, or bring the two nearer together.";
    case "person":
    case "pianist":
      if (clash.elsewhere) {
        return them === "yourself"
          ? "Move one, or let somebody stand in."
          : "Ask them, or move it.";
      }
      return `Move one of the two, or let ${them} off one.`;
  }
}

function whom(clash: SeasonClash): string {
  return clash.who[0] === "You" ? "you" : "they";
}

function eventOf(id: string, season: Pick<Season, "events" | "productions">): Words {
  const event = season.events.find((e) => e.id === id);
  const production = season.productions.find((p) => p.id === event?.productionId);
  if (!event || !production) return ["a call"];
  return [`${eventInSentence(event.kind)} of `, { work: production.title }];
}

/** "Wren Tallis", "Wren Tallis and Dele Fashanu", "Wren Tallis, Dele Fashanu and 3 others". */
export function namesInWords(names: readonly string[]): string {
  const [first = "Someone", second, ...rest] = names;
  if (second === undefined) return first;
  if (rest.length === 0) return `${first} and ${second}`;
  return `${first}, ${second} and ${String(rest.length)} ${rest.length === 1 ? "other" : "others"}`;
}
