"use client";

import { useQuery } from "@tanstack/react-query";
import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { TimeText } from "@/components/ui/time-text";
import { acknowledgementsQuery } from "@/lib/client/sheets";
import type { Acknowledged } from "@/lib/data/sheets/read";

type Props = { productionId: string; issueId: string; zone: string; initial: Acknowledged[] };

/** Who has acknowledged the issue and who has not, those who have not first. */
export function WhoHasRead({ productionId, issueId, zone, initial }: Props) {
  const { data } = useQuery({
    ...acknowledgementsQuery(productionId, issueId),
    initialData: initial,
  });
  const read = data.filter((person) => person.at !== null).length;
  return (
    <section aria-labelledby="who-has-read" className="print:hidden">
      <SectionTitle id="who-has-read">Who has read it</SectionTitle>
      <p role="status" className="mb-2 text-sm text-ink-2">
        {read} of {data.length}
      </p>
      <ul className="text-sm">
        {data.map((person) => (
          <li
            key={person.personId}
            className="flex justify-between gap-3 border-b border-rule py-2 first:border-t"
          >
            <span className="min-w-0">{person.name}</span>
            {person.at === null ? (
              <Chip tone="stretch">Not yet</Chip>
            ) : (
              <TimeText at={person.at} timeZone={zone} show="both" className="text-ink-2" />
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
