import type { ChipTone } from "@/components/ui/chip";
import type { Season } from "@/lib/data/season";
import type { SeasonClash, SeasonProduction, SeasonProgress } from "@/lib/data/season/types";
import { clashAdvice, clashInWords } from "./clash-words";
import type { Words } from "./clash-words";
import { eventHref } from "./event-words";

export type Need = {
  id: string;
  tone: ChipTone;
  /** One word: what kind of thing it is. */
  chip: string;
  /** When, for what has a time. */
  when: { from: Date; to: Date; zone: string } | null;
  words: Words;
  /** The link that does it. */
  act: { label: string; href: string };
};

/**
 * What waits for this person, the soonest clash first, then what each production lacks. Only what they can do something
 * about: a clash in a production whose calls they plan or that is their own, and counts of what their position changes.
 */
export function findNeeds(season: Season, now: Date): Need[] {
  const byId = new Map(season.productions.map((production) => [production.id, production]));
  const clashes = season.clashes
    .filter((clash) => clash.to > now)
    .sort((a, b) => a.from.getTime() - b.from.getTime())
    .flatMap((clash) => needOfClash(clash, season, byId));
  const lacks = season.progress.flatMap((progress) => {
    const production = byId.get(progress.productionId);
    return production ? needsOfProduction(production, progress) : [];
  });
  return [...clashes, ...lacks];
}

function needOfClash(
  clash: SeasonClash,
  season: Season,
  byId: ReadonlyMap<string, SeasonProduction>,
): Need[] {
  const events = clash.eventIds.flatMap((id) => season.events.find((e) => e.id === id) ?? []);
  const movable = events.filter((event) => byId.get(event.productionId)?.plans);
  const [first] = events;
  if (!first || (movable.length === 0 && clash.who[0] !== "You")) return [];
  // A call is sooner moved than a day of auditions; of two calls the later one.
  const target =
    movable.findLast((event) => event.kind !== "audition" && event.kind !== "callback") ??
    movable.at(-1) ??
    first;
  const label =
    movable.length === 0
      ? "See it"
      : target.kind === "audition"
        ? "See the day"
        : target.kind === "callback"
          ? "See the callbacks"
          : clash.kind === "room"
            ? "Change the room"
            : "Move the call";
  return [
    {
      id: clash.id,
      tone: "clash",
      chip: "Clash",
      when: { from: clash.from, to: clash.to, zone: clash.zone },
      words: [...clashInWords(clash, season), ` ${clashAdvice(clash)}`],
      act: { label, href: eventHref(target) },
    },
  ];
}

function needsOfProduction(production: SeasonProduction, progress: SeasonProgress): Need[] {
  const { id, title, stage, leads, plans } = production;
  const at = (area: string) => `/productions/${id}/${area}`;
  const needs: Need[] = [];
  const add = (chip: string, words: Words, act: Need["act"]) =>
    needs.push({ id: `${id} ${chip}`, tone: "stretch", chip, when: null, words, act });
  const { signUps, unanswered, roles } = progress;
  if (leads && signUps && signUps.roomsWithoutPianist > 0) {
    add(
      "Pianist",
      [
        `${count(signUps.roomsWithoutPianist, "audition room")} of `,
        { work: title },
        ` ${signUps.roomsWithoutPianist === 1 ? "has" : "have"} no pianist.`,
      ],
      { label: "Choose a pianist", href: at("auditions") },
    );
  }
  if (plans && signUps && signUps.unplaced > 0 && (stage === "planning" || stage === "auditions")) {
    add(
      "Slots",
      [
        `${count(signUps.unplaced, "singer")} signed up for `,
        { work: title },
        ` ${signUps.unplaced === 1 ? "has" : "have"} no slot.`,
      ],
      { label: "Give slots", href: at("auditions") },
    );
  }
  if (plans && unanswered !== null && unanswered > 0) {
    add(
      "Answers",
      [
        `${count(unanswered, "callback")} of `,
        { work: title },
        ` ${unanswered === 1 ? "has" : "have"} no answer yet.`,
      ],
      {
        label: "See who",
        href: at("callbacks"),
      },
    );
  }
  const open = roles ? roles.all - roles.cast : 0;
  if (leads && roles && open > 0 && (stage === "casting" || stage === "rehearsals")) {
    add(
      "Casting",
      [
        `${String(open)} of ${count(roles.all, "role")} in `,
        { work: title },
        ` ${open === 1 ? "is" : "are"} not cast.`,
      ],
      { label: "Open the grid", href: at("casting") },
    );
  }
  return needs;
}

/** "1 role", "2 roles". */
export function count(n: number, thing: string): string {
  return `${String(n)} ${thing}${n === 1 ? "" : "s"}`;
}
