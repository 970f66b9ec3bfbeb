import { Chip, type ChipTone } from "@/components/ui/chip";
import { EmptyState } from "@/components/ui/empty-state";
import type { OwnConflict } from "@/lib/data/conflicts";
import { longDay, shortDay } from "@/lib/format-dates";
import { RemoveConflict } from "./remove-conflict";

const STATE: Record<OwnConflict["told"][number]["state"], { words: string; tone: ChipTone }> = {
  asked: { words: "asked", tone: "stretch" },
  agreed: { words: "agreed", tone: "fits" },
  declined: { words: "declined", tone: "clash" },
};

function inWords({ localFrom, localTo, timeFrom, timeTo }: OwnConflict): string {
  if (localFrom !== localTo) return `${shortDay(localFrom)} to ${shortDay(localTo)}`;
  return timeFrom !== null && timeTo !== null
    ? `${longDay(localFrom)}, ${timeFrom}–${timeTo}`
    : longDay(localFrom);
}

/** The dates told so far, with each company's answer. */
export function ConflictList({
  conflicts,
  namesCompany,
}: {
  conflicts: readonly OwnConflict[];
  namesCompany: boolean;
}) {
  if (conflicts.length === 0)
    return (
      <EmptyState title="No dates yet">
        Say when you cannot come as early as you know it: a call that is not out yet is easily put
        elsewhere.
      </EmptyState>
    );
  return (
    <ul className="border-t border-rule">
      {conflicts.map((conflict) => {
        const words = inWords(conflict);
        return (
          <li
            key={conflict.ids.join()}
            className="flex items-start justify-between gap-4 border-b border-rule py-3"
          >
            <div className="min-w-0">
              <p className="font-bold">{words}</p>
              {conflict.reason !== null && <p className="text-sm text-ink-2">{conflict.reason}</p>}
              <ul className="mt-1.5 flex flex-wrap gap-2">
                {conflict.told.map(({ company, state }) => (
                  <li key={company} className="flex items-center gap-1.5 text-sm">
                    {namesCompany && company}{" "}
                    <Chip tone={STATE[state].tone}>{STATE[state].words}</Chip>
                  </li>
                ))}
              </ul>
              {conflict.told.some(({ state }) => state === "declined") && (
                <p className="mt-1 text-sm text-ink-2">
                  Declined means that you are still wanted then. Speak to the stage manager.
                </p>
              )}
            </div>
            <RemoveConflict conflictIds={conflict.ids} words={words} />
          </li>
        );
      })}
    </ul>
  );
}
