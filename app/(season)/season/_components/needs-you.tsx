import type { Route } from "next";
import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { clock, clockSpan, localDay, shortDay } from "@/lib/format-dates";
import type { Words } from "./clash-words";
import type { Need } from "./needs";

function InWords({ words }: { words: Words }) {
  return words.map((part, index) =>
    typeof part === "string" ? part : <cite key={index}>{part.work}</cite>,
  );
}

function whenInWords({ from, to, zone }: NonNullable<Need["when"]>): string {
  const day = shortDay(localDay(from, zone));
  return from.getTime() === to.getTime()
    ? `${day}, ${clock(from, zone)}`
    : `${day}, ${clockSpan(from, to, zone)}`;
}

/** What waits for this person, each with the link that does it. */
export function NeedsYou({ needs }: { needs: readonly Need[] }) {
  return (
    <section aria-labelledby="needs-you">
      <SectionTitle id="needs-you" ruled>
        Needs you
      </SectionTitle>
      {needs.length === 0 ? (
        <p className="py-3 text-ink-2">Nothing waits for you.</p>
      ) : (
        <ul>
          {needs.map((need) => (
            <li
              key={need.id}
              className="grid grid-cols-[4.75rem_minmax(0,1fr)] gap-x-4 gap-y-2 border-b border-rule py-3 sm:grid-cols-[4.75rem_minmax(0,1fr)_auto]"
            >
              <span>
                <Chip tone={need.tone}>{need.chip}</Chip>
              </span>
              <div className="text-sm">
                {need.when && <p className="font-bold">{whenInWords(need.when)}</p>}
                <p>
                  <InWords words={need.words} />
                </p>
              </div>
              <div className="max-sm:col-start-2">
                <Button asChild size="small">
                  <Link href={need.act.href as Route}>{need.act.label}</Link>
                </Button>
              </div>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}
