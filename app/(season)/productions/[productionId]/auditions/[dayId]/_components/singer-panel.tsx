"use client";

import { useQueryClient } from "@tanstack/react-query";
import { useId, useState } from "react";
import { RangeKeyboard, type PickedRange } from "@/components/music/range-keyboard";
import { LOST_CONNECTION } from "@/components/forms/lost-connection";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Field } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import { Select } from "@/components/ui/select";
import { showToast } from "@/components/ui/toast-store";
import type { AuditionDayView, SingerOnDay } from "@/lib/auditions/day-view";
import { auditionDayQuery, slotOfSinger } from "@/lib/client/auditions";
import { clock } from "@/lib/format-dates";
import { pitchName } from "@/lib/music/pitch-name";
import { StateMark } from "../../_components/state-mark";
import { hearRange } from "../../actions";
import type { Move } from "./use-moves";

type Props = {
  day: AuditionDayView;
  singer: SingerOnDay;
  onMove: (move: Move) => void;
  onClose: () => void;
};

function facts(singer: SingerOnDay): string[] {
  return [
    singer.song,
    singer.bars === null ? null : `${String(singer.bars)} bars`,
    singer.asksFor === null ? null : `asks for ${singer.asksFor}`,
    singer.notBefore === null ? null : `not before ${singer.notBefore}`,
    singer.notAfter === null ? null : `not after ${singer.notAfter}`,
    singer.minor ? "under 18" : null,
  ].flatMap((part) => part ?? []);
}

/** One singer: a plain way to move them, and the range heard. */
export function SingerPanel({ day, singer, onMove, onClose }: Props) {
  const from = slotOfSinger(day, singer.signUpId);
  const told = facts(singer);
  return (
    <Dialog
      open
      onOpenChange={(open) => {
        if (!open) onClose();
      }}
      title={singer.name}
      description={
        told.length > 0 ? `${told.join(", ")}.` : "Nothing more is known of what they bring."
      }
    >
      <p className="flex flex-wrap gap-x-4 text-sm">
        <StateMark state={singer.state} />
        {singer.pronouns !== null && <span className="text-ink-2">{singer.pronouns}</span>}
      </p>
      {day.may.plan && (
        <MoveTo day={day} singer={singer} from={from} onMove={onMove} onClose={onClose} />
      )}
      {day.may.hear && <RangeHeard day={day} singer={singer} />}
    </Dialog>
  );
}

function MoveTo({ day, singer, from, onMove, onClose }: Props & { from: string | null }) {
  const [slotId, setSlotId] = useState("");
  const act = (target: string | null) => {
    onClose();
    onMove({ signUpId: singer.signUpId, slotId: target });
  };
  return (
    <section aria-label="Move" className="flex flex-wrap items-end gap-3 border-t border-rule pt-4">
      <Field label={from === null ? "Place at" : "Move to"} className="min-w-56 flex-1">
        <Select value={slotId} onChange={(event) => setSlotId(event.currentTarget.value)}>
          <option value="">Choose a slot</option>
          {day.rooms.map((room) => (
            <optgroup key={room.id} label={room.name}>
              {room.items
                .filter(
                  (item) => (item.kind === "slot" || item.kind === "hold") && item.id !== from,
                )
                .filter((item) => item.singer === null || from !== null)
                .map((item) => (
                  <option key={item.id} value={item.id}>
                    {clock(new Date(item.startsAt), day.zone)}{" "}
                    {item.singer
                      ? `swap with ${item.singer.name}`
                      : item.kind === "hold"
                        ? "held"
                        : "free"}
                  </option>
                ))}
            </optgroup>
          ))}
        </Select>
      </Field>
      <Button kind="primary" disabled={slotId === ""} onClick={() => act(slotId)}>
        {from === null ? "Place" : "Move"}
      </Button>
      {from !== null && <Button onClick={() => act(null)}>Take out of the slot</Button>}
    </section>
  );
}

function RangeHeard({ day, singer }: { day: AuditionDayView; singer: SingerOnDay }) {
  const client = useQueryClient();
  const hintId = useId();
  const [range, setRange] = useState<PickedRange>({
    low: singer.range?.low ?? null,
    high: singer.range?.high ?? null,
  });
  const [pending, setPending] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);

  async function save() {
    if (range.low === null || range.high === null) {
      setProblem("Choose the lowest and the highest note first.");
      return;
    }
    setPending(true);
    setProblem(null);
    const result = await hearRange({
      productionId: day.productionId,
      personId: singer.personId,
      low: range.low,
      high: range.high,
      comfortableLow: null,
      comfortableHigh: null,
    }).catch(() => null);
    setPending(false);
    if (!result?.ok) {
      setProblem(result ? result.error.message : LOST_CONNECTION);
      return;
    }
    showToast({ title: `The range heard from ${singer.name} is written down.` });
    await client.invalidateQueries({
      queryKey: auditionDayQuery(day.productionId, day.id).queryKey,
    });
  }

  return (
    <section aria-label="Range heard" className="flex flex-col gap-3 border-t border-rule pt-4">
      <h3 className="text-xl">Range heard</h3>
      <p id={hintId} className="text-sm text-ink-2">
        {singer.range
          ? `On file: ${pitchName(singer.range.low)}–${pitchName(singer.range.high)}, ${singer.range.kind}.`
          : "No range is on file."}{" "}
        Press the lowest and the highest note you heard. Never ask for a note that strains.
      </p>
      <RangeKeyboard
        value={range}
        onChange={setRange}
        label={`The range heard from ${singer.name}`}
        aria-describedby={hintId}
      />
      {problem !== null && <Notice tone="error" title={problem} />}
      <PendingButton pending={pending} className="self-start" onClick={() => void save()}>
        Save the range heard
      </PendingButton>
    </section>
  );
}
