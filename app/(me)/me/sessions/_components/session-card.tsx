import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import type { OwnMusic, OwnSession } from "@/lib/data/pianists/own";
import { clock, localDay, longDay } from "@/lib/format-dates";
import type { Interval } from "@/lib/schedule/types";

type Row = { at: Interval; music: OwnMusic | null };

/** One session at the piano: when and where, then everything to be played in order, with the rests in their places. */
export function SessionCard({ session, open }: { session: OwnSession; open: boolean }) {
  const { zone, music, rests } = session;
  const rows: Row[] = [
    ...music.map((item) => ({ at: item, music: item })),
    ...rests.map((rest) => ({ at: rest, music: null })),
  ].sort((a, b) => a.at.from.getTime() - b.at.from.getTime());
  const heading = `${session.sessionId}-when`;
  return (
    <article aria-labelledby={heading}>
      <h2
        id={heading}
        className="flex flex-wrap items-baseline justify-between gap-x-4 border-b border-ink pb-1 text-2xl"
      >
        {longDay(localDay(session.from, zone))}
        <span className="font-sans text-xl font-bold">
          {clock(session.from, zone)}–{clock(session.to, zone)}
        </span>
      </h2>
      <p className="mt-2">
        {session.what} · <cite>{session.production}</cite>, {session.company}
      </p>
      <p className="text-ink-2">
        {[session.room, session.venue, session.address]
          .filter((part) => part !== null)
          .join(", ") || "Place to follow"}
      </p>
      {rows.length === 0 ? (
        <p className="mt-3 text-ink-2">The music follows.</p>
      ) : (
        <details open={open} className="mt-2">
          <summary className="flex min-h-11 items-center font-bold text-smalt">
            {music.length === 0
              ? "Rests only so far"
              : music.length === 1
                ? "1 piece"
                : `${music.length} pieces`}
          </summary>
          <ol className="border-t border-rule">
            {rows.map(({ at, music: item }) =>
              item === null ? (
                <li
                  key={at.from.toISOString()}
                  className="flex gap-4 border-b border-rule hatched px-1 py-2"
                >
                  <span className="w-14 shrink-0 font-bold">{clock(at.from, zone)}</span>
                  <span className="bg-paper px-1.5">Rest until {clock(at.to, zone)}</span>
                </li>
              ) : (
                <MusicRow key={item.id} item={item} zone={zone} />
              ),
            )}
          </ol>
        </details>
      )}
      <Contacts contacts={session.contacts} />
    </article>
  );
}

function MusicRow({ item, zone }: { item: OwnMusic; zone: string }) {
  const facts = [
    item.key,
    item.tempo === null ? null : `${item.tempo} a minute`,
    item.bars,
    item.detail,
  ].filter((fact) => fact !== null);
  return (
    <li className="flex gap-4 border-b border-rule px-1 py-2.5">
      <span className="w-14 shrink-0 font-bold">{clock(item.from, zone)}</span>
      <div className="min-w-0 flex-1">
        <p className="flex flex-wrap items-baseline gap-x-2 font-serif text-lg">
          {item.label !== null && <RehearsalMark className="font-sans">{item.label}</RehearsalMark>}
          {item.title}
        </p>
        {facts.length > 0 && <p className="text-sm text-ink-2">{facts.join(" · ")}</p>}
        {item.people.length > 0 && <p>{item.people.join(", ")}</p>}
      </div>
    </li>
  );
}

function Contacts({ contacts }: { contacts: OwnSession["contacts"] }) {
  const reachable = contacts.filter((contact) => contact.phone !== null);
  if (reachable.length === 0) return null;
  return (
    <p className="mt-3 flex flex-wrap gap-x-6 text-sm">
      {reachable.map(({ name, position, phone }) => (
        <a
          key={`${name} ${position}`}
          href={`tel:${(phone ?? "").replace(/[^+\d]/g, "")}`}
          className="inline-flex min-h-11 items-center text-link md:min-h-8"
        >
          {name}, {position.toLowerCase()}: {phone}
        </a>
      ))}
    </p>
  );
}
