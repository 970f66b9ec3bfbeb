import type {
  SeasonClash as DrawnClash,
  SeasonGroup,
  SeasonProduction as Stave,
} from "@/components/schedule/season-types";
import type { Season } from "@/lib/data/season";
import type { SeasonEvent, SeasonProduction } from "@/lib/data/season/types";
import { clock, clockSpan, localDay, shortDay } from "@/lib/format-dates";
import { groupBy } from "@/lib/group-by";
import { asText, clashInWords } from "./clash-words";
import { eventName, eventShape } from "./event-words";
import { stageName } from "../../_components/stage-name";

const ELSEWHERE = "elsewhere";

function minutesOfDay(at: Date, zone: string): number {
  const [hours = 0, minutes = 0] = clock(at, zone).split(":").map(Number);
  return hours * 60 + minutes;
}

/** The season as it is drawn: a stave per production, by company, and one for what the person does elsewhere. */
export function toStaves(
  season: Season,
  now: Date,
): { groups: SeasonGroup[]; clashes: DrawnClash[] } {
  const eventsOf = groupBy(season.events, (event) => event.productionId);
  const companies = groupBy(season.productions, (production) => production.companyId);
  const groups: SeasonGroup[] = [...companies.values()].map((productions) => ({
    label: productions[0]?.companyName ?? "",
    productions: productions.map((production): Stave => {
      const events = eventsOf.get(production.id) ?? [];
      return {
        id: production.id,
        title: production.title,
        sub: whatComes(production, events, now),
        href: `/productions/${production.id}`,
        events: events.map((event) => ({
          id: event.id,
          kind: eventShape(event.kind),
          localDate: localDay(event.from, event.zone),
          minutesOfDay: minutesOfDay(event.from, event.zone),
          label: [
            `${eventName(event.kind)}, ${clockSpan(event.from, event.to, event.zone)}`,
            ...(event.room === null ? [] : [event.room]),
            ...(event.draft ? ["not published yet"] : []),
          ].join(", "),
        })),
      };
    }),
  }));
  if (season.elsewhere.length > 0) {
    groups.push({
      label: "You, elsewhere",
      productions: [
        {
          id: ELSEWHERE,
          title: "Where you sing or play",
          sub: "From your own page",
          href: "/me",
          tone: "smalt",
          events: season.elsewhere.map((event) => ({
            id: event.id,
            kind: eventShape(event.kind),
            localDate: localDay(event.from, event.zone),
            minutesOfDay: minutesOfDay(event.from, event.zone),
            label: `${eventName(event.kind)} of ${event.production}, ${clockSpan(event.from, event.to, event.zone)}`,
          })),
        },
      ],
    });
  }
  const productionOf = new Map(season.events.map((event) => [event.id, event.productionId]));
  return {
    groups,
    clashes: season.clashes.map((clash) => ({
      localDate: localDay(clash.from, clash.zone),
      minutesOfDay: minutesOfDay(clash.from, clash.zone),
      productionIds: [
        ...new Set(clash.eventIds.flatMap((id) => productionOf.get(id) ?? [])),
        ...(clash.elsewhere && clash.who[0] === "You" ? [ELSEWHERE] : []),
      ],
      label: asText(clashInWords(clash, season)),
    })),
  };
}

/** What comes next in a production, for the line under its title. */
export function whatComes(
  production: Pick<SeasonProduction, "stage" | "opensOn" | "closesOn" | "zone">,
  events: readonly Pick<SeasonEvent, "kind" | "from" | "to" | "zone">[],
  now: Date,
): string {
  const next = (kind: SeasonEvent["kind"]) =>
    events.find((event) => event.kind === kind && event.to > now);
  for (const [kind, name] of [
    ["audition", "Auditions"],
    ["callback", "Callbacks"],
  ] as const) {
    const event = next(kind);
    if (event) return `${name} ${shortDay(localDay(event.from, event.zone))}`;
  }
  const today = localDay(now, production.zone);
  if (production.opensOn !== null && production.opensOn >= today) {
    return `Opens ${shortDay(production.opensOn)}`;
  }
  if (production.closesOn !== null && production.closesOn >= today) {
    return `Runs to ${shortDay(production.closesOn)}`;
  }
  return stageName(production.stage);
}
