import Link from "next/link";
import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { clock, localDay, shortDay } from "@/lib/format-dates";
import type { Upcoming } from "./upcoming";

/** As many as one looks ahead to; the rest unfolds. */
const SHOWN = 6;

/** Where to be next, in order. */
export function UpcomingList({ items }: { items: readonly Upcoming[] }) {
  if (items.length === 0) return null;
  const later = items.slice(SHOWN);
  return (
    <section aria-labelledby="coming-up">
      <SectionTitle id="coming-up" ruled>
        Coming up
      </SectionTitle>
      <ol>
        {items.slice(0, SHOWN).map((item) => (
          <UpcomingItem key={item.id} item={item} />
        ))}
      </ol>
      {later.length > 0 && (
        <details>
          <summary className="flex min-h-11 items-center font-bold text-smalt">
            {later.length} more
          </summary>
          <ol className="border-t border-rule">
            {later.map((item) => (
              <UpcomingItem key={item.id} item={item} />
            ))}
          </ol>
        </details>
      )}
    </section>
  );
}

function UpcomingItem({ item }: { item: Upcoming }) {
  return (
    <li className="flex gap-4 border-b border-rule py-3">
      <p className="w-24 shrink-0">
        <strong className="block">{shortDay(localDay(item.startsAt, item.zone))}</strong>
        {clock(item.startsAt, item.zone)}–{clock(item.endsAt, item.zone)}
      </p>
      <div className="min-w-0 flex-1">
        <p>
          {item.what} · <cite>{item.production}</cite>
        </p>
        {item.where !== null && <p className="text-sm text-ink-2">{item.where}</p>}
        {item.detail !== null && <p className="text-sm text-ink-2">{item.detail}</p>}
        {(item.state !== null || item.link !== null) && (
          <p className="mt-1 flex flex-wrap items-center gap-x-3">
            {item.state && <Chip tone={item.state.tone}>{item.state.words}</Chip>}
            {item.link && (
              <Link
                href={item.link.href}
                className="inline-flex min-h-11 items-center text-link md:min-h-8"
              >
                {item.link.label}
                <span className="sr-only">
                  : {item.what}, {item.production}
                </span>
              </Link>
            )}
          </p>
        )}
      </div>
    </li>
  );
}
