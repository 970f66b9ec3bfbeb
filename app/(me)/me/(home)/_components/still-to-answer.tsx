import type { Route } from "next";
import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { localDay, shortDay } from "@/lib/format-dates";
import type { Decision } from "./choose-decision";

function inWords(decision: Decision): { what: string; work: string; day: string | null } {
  switch (decision.kind) {
    case "invitation":
      return {
        what: "Invitation",
        work: decision.invitation.production ?? decision.invitation.company,
        day: null,
      };
    case "slot":
      return {
        what: "Audition",
        work: decision.slot.production,
        day: shortDay(decision.slot.localDate),
      };
    case "sheet":
      return {
        what: "Call sheet",
        work: decision.sheet.production,
        day: shortDay(decision.sheet.localDate),
      };
    case "callback": {
      const { startsAt, zone, production } = decision.callback;
      return {
        what: "Callback",
        work: production,
        day: startsAt === null ? null : shortDay(localDay(startsAt, zone)),
      };
    }
  }
}

/** What waits behind the decision on the screen, one press away. */
export function StillToAnswer({ waiting }: { waiting: readonly Decision[] }) {
  if (waiting.length === 0) return null;
  return (
    <section aria-labelledby="still">
      <SectionTitle id="still" ruled>
        Still to answer
      </SectionTitle>
      <ul>
        {waiting.map((decision) => {
          const { what, work, day } = inWords(decision);
          return (
            <li key={decision.id} className="border-b border-rule">
              <Link
                href={`/me?answer=${decision.id}` as Route}
                className="flex min-h-11 items-center justify-between gap-4 py-2"
              >
                <span>
                  {what} · <cite>{work}</cite>
                </span>
                <span className="row-link shrink-0">{day ?? "Answer"}</span>
              </Link>
            </li>
          );
        })}
      </ul>
    </section>
  );
}
