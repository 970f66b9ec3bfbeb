import Link from "next/link";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { Chip } from "@/components/ui/chip";
import { CALL_KIND_NAMES } from "@/lib/calls/call-kinds";
import type { CallListed } from "@/lib/data/calls/list";
import { clockSpan } from "@/lib/format-dates";

/** One call of a week's list. */
export function CallRow({ productionId, call }: { productionId: string; call: CallListed }) {
  const cancelled = call.state === "cancelled";
  return (
    <li className="grid gap-x-6 gap-y-1 border-b border-rule py-3 md:grid-cols-[8rem_minmax(0,1fr)_auto]">
      <p className={cancelled ? "text-ink-2 line-through" : "font-bold"}>
        {clockSpan(call.startsAt, call.endsAt, call.zone)}
      </p>
      <div className="min-w-0">
        <p>
          <Link className="row-link" href={`/productions/${productionId}/rehearsals/${call.id}`}>
            {call.title ?? CALL_KIND_NAMES[call.kind]}
          </Link>
          <span className="text-ink-2">
            {" "}
            {[
              call.room ?? "no room yet",
              call.leader === null ? "" : `${call.leader} leads`,
              call.pianist === null ? "no pianist" : `${call.pianist} at the piano`,
            ]
              .filter(Boolean)
              .join(" · ")}
          </span>
        </p>
        <ul className="mt-1 flex flex-wrap gap-x-4 gap-y-1 text-sm">
          {call.what.map((block, index) => (
            <li key={`${block.title} ${String(index)}`} className="flex items-center gap-1.5">
              {block.label !== null && <RehearsalMark>{block.label}</RehearsalMark>}
              <span className="font-serif text-base">{block.title}</span>
            </li>
          ))}
        </ul>
      </div>
      <p className="flex flex-wrap items-start gap-2 text-sm md:justify-end">
        <span className="text-ink-2">
          {call.people} {call.people === 1 ? "person" : "people"}
        </span>
        {call.state !== "published" && (
          <Chip tone={cancelled ? "plain" : "info"}>{cancelled ? "Cancelled" : "Draft"}</Chip>
        )}
        {call.clashes !== null && call.clashes > 0 && (
          <Chip tone="clash">
            {call.clashes} {call.clashes === 1 ? "clash" : "clashes"}
          </Chip>
        )}
      </p>
    </li>
  );
}
