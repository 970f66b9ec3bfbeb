"use client";

import { SectionTitle } from "@/components/layout/page-title";
import { Chip } from "@/components/ui/chip";
import { formatDuration } from "@/components/ui/format-duration";
import { Notice } from "@/components/ui/notice";
import type { Remedy } from "@/lib/calls/types";
import type { CallCheck } from "@/lib/data/calls/check";
import { ClashList } from "./clash-list";
import { lastOf, type CheckState } from "./use-call-check";

/** What follows from the call as it stands in the form: times, clashes, waiting. Nothing of it is saved. */
export function CheckPanel({
  state,
  onTake,
}: {
  state: CheckState;
  onTake: (remedy: Remedy) => void;
}) {
  const check = lastOf(state);
  return (
    <div className="flex flex-col gap-6 lg:sticky lg:top-4 lg:max-h-[calc(100dvh-2rem)] lg:overflow-y-auto">
      <div role="status" className="text-sm text-ink-2">
        {state.at === "incomplete" &&
          "Choose a day, a time and at least one block: clashes are looked for as you go."}
        {state.at === "checking" && "Looking for clashes."}
        {state.at === "checked" && summaryOf(state.check)}
      </div>
      {state.at === "failed" && <Notice tone="error" title={state.message} />}
      {check && (
        <>
          <section aria-label="When">
            <p className="font-serif text-2xl">{check.day}</p>
            <p>
              {check.from}–{check.to}, {formatDuration(check.minutes)}
            </p>
            {check.clockNote !== null && (
              <Notice tone="caution" className="mt-2" title={check.clockNote} />
            )}
          </section>
          <section aria-labelledby="check-clashes">
            <SectionTitle id="check-clashes">Clashes</SectionTitle>
            {check.clashes.length === 0 ? (
              <p className="text-sm">
                <Chip tone="fits">None</Chip>{" "}
                {check.castHidden
                  ? "Everyone shown here, the room and the pianist are free."
                  : "Everyone, the room and the pianist are free."}
              </p>
            ) : (
              <ClashList clashes={check.clashes} onTake={onTake} />
            )}
          </section>
          {check.castHidden ? (
            <Notice title="The cast list is not out yet.">
              Whom the score needs is called all the same and is left out here. The music director
              publishes calls for what is sung until it is out.
            </Notice>
          ) : (
            <section aria-labelledby="check-waiting">
              <SectionTitle id="check-waiting">Waiting</SectionTitle>
              <p className="font-serif text-3xl">
                {formatDuration(check.waiting)}{" "}
                <span className="text-lg text-ink-2">singer-time</span>
              </p>
              <p className="text-sm text-ink-2">
                Minutes between people’s first and last block in which they are not needed, added
                up.
              </p>
            </section>
          )}
        </>
      )}
    </div>
  );
}

function summaryOf(check: CallCheck): string {
  const { length } = check.clashes;
  if (length === 0) return "No clash. Nothing is saved until you press the button.";
  return `${String(length)} ${length === 1 ? "clash" : "clashes"}. A draft may hold them; nothing is saved until you press the button.`;
}
