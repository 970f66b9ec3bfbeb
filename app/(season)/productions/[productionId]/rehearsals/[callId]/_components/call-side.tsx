import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { formatDuration } from "@/components/ui/format-duration";
import type { CallRead } from "@/lib/data/calls/read";

/** How long people wait, added up; and who is not cast, excused or called by hand. */
export function WaitingAndChanges({ call }: { call: CallRead }) {
  const uncast = [...new Set(call.blocks.flatMap((block) => block.uncastRoles))];
  const changes = call.blocks.flatMap((block) =>
    block.called
      .filter((person) => person.excused || person.source === "hand")
      .map((person) => ({ ...person, block: block.title })),
  );
  return (
    <>
      <section aria-labelledby="waiting">
        <SectionTitle id="waiting">Waiting</SectionTitle>
        <p className="font-serif text-5xl">
          {formatDuration(call.waiting)} <span className="text-lg text-ink-2">singer-time</span>
        </p>
        <p className="mt-1 text-sm">
          {call.waiting === 0
            ? "Nobody waits between their blocks in this order."
            : "What people spend between their first and last block without being needed, added up."}
        </p>
      </section>
      {uncast.length > 0 && (
        <section aria-labelledby="uncast">
          <SectionTitle id="uncast">Not cast yet</SectionTitle>
          <p className="text-sm">
            <Chip tone="stretch">
              {uncast.length === 1 ? "One role" : `${String(uncast.length)} roles`}
            </Chip>{" "}
            {uncast.join(", ")} {uncast.length === 1 ? "sings" : "sing"} here and nobody is called
            for it.
          </p>
        </section>
      )}
      {changes.length > 0 && (
        <section aria-labelledby="changes">
          <SectionTitle id="changes">Changed by hand</SectionTitle>
          <ul className="text-sm">
            {changes.map((change) => (
              <li
                key={`${change.personId} ${change.block}`}
                className="border-b border-rule py-2 first:border-t"
              >
                <strong>{change.name}</strong> is {change.excused ? "excused from" : "called for"}{" "}
                {change.block}
                {change.reason === null ? "" : `: ${change.reason}`}
              </li>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}
