"use client";

import { useQuery } from "@tanstack/react-query";
import { useEffect, useState } from "react";
import { DayColumns } from "@/components/schedule/day-columns";
import { SideColumn } from "@/components/layout/side-column";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import { Notice } from "@/components/ui/notice";
import type { AuditionDayView, ItemOnDay, RoomOnDay, SingerOnDay } from "@/lib/auditions/day-view";
import { pianistLanes } from "@/lib/auditions/pianist-lanes";
import { auditionDayQuery, findSlot } from "@/lib/client/auditions";
import { clock, localDay, longDay } from "@/lib/format-dates";
import { AskBeforeMove } from "./ask-before-move";
import { DaySide } from "./day-side";
import { DayTools } from "./day-tools";
import { SingerPanel } from "./singer-panel";
import { SlotCell } from "./slot-cell";
import { toldBy, useMoves, type Move } from "./use-moves";
import { useSlotDrag } from "./use-slot-drag";
import { useSlotKeys } from "./use-slot-keys";

type Props = {
  initial: AuditionDayView;
  accompanists: readonly { personId: string; name: string }[];
  locale: string;
};

/** Local minutes after midnight, for the drawing. */
function minutesOf(iso: string, zone: string): number {
  const [hours = 0, minutes = 0] = clock(new Date(iso), zone).split(":").map(Number);
  return hours * 60 + minutes;
}

/** The present instant, refreshed twice a minute; null until the browser is there. */
function useNow(): Date | null {
  const [now, setNow] = useState<Date | null>(null);
  useEffect(() => {
    const tick = () => setNow(new Date());
    tick();
    const timer = setInterval(tick, 30_000);
    return () => clearInterval(timer);
  }, []);
  return now;
}

const LANE_TONES = ["smalt", "verdigris", "ochre"] as const;

/** One audition day, live: rooms as columns of time, singers to be moved by pointer or keyboard, and what waits beside it. */
export function DayBoard({ initial, accompanists, locale }: Props) {
  const query = useQuery({
    ...auditionDayQuery(initial.productionId, initial.id),
    initialData: initial,
  });
  const day = query.data;
  const now = useNow();
  const { move } = useMoves(day);
  const [asking, setAsking] = useState<Move | null>(null);
  const [opened, setOpened] = useState<string | null>(null);

  function request(wanted: Move) {
    if (toldBy(day, wanted).length > 0) setAsking(wanted);
    else move(wanted);
  }
  const drop = (signUpId: string, slotId: string) => {
    if (findSlot(day, slotId)?.item.singer?.signUpId !== signUpId) request({ signUpId, slotId });
  };
  const keys = useSlotKeys({ day, mayMove: day.may.plan, onDrop: drop });
  const drag = useSlotDrag(drop);

  const items = day.rooms.flatMap((room) => room.items);
  const singers = items.flatMap((item) => item.singer ?? []);
  const singerOpened = [...singers, ...day.waiting].find((singer) => singer.signUpId === opened);
  const nobody = day.rooms.some((room) => pianistLanes(room).some((piece) => piece.name === null));
  const place = (singer: SingerOnDay) => {
    const free =
      items.find((item) => item.kind === "slot" && item.singer === null) ??
      items.find((item) => item.kind === "slot");
    keys.pickUp(singer.signUpId, singer.name, free?.id ?? null);
  };

  return (
    <>
      <PageTitle
        title={longDay(day.localDate, locale)}
        sub={`${day.rooms.length === 1 ? "One room" : `${String(day.rooms.length)} rooms`}, ${String(singers.length)} singers, ${String(day.slotMinutes)} minutes each.`}
        chips={
          <>
            <Chip tone="fits">{`${String(singers.length)} placed`}</Chip>
            {day.waiting.length > 0 && (
              <Chip tone="stretch">{`${String(day.waiting.length)} waiting`}</Chip>
            )}
            {nobody && <Chip tone="clash">no pianist for part of the day</Chip>}
          </>
        }
        actions={<DayTools day={day} />}
      />
      {query.isError && (
        <Notice tone="caution" title="This may be old." className="mb-4">
          {query.error.message}
        </Notice>
      )}
      <p role="status" className="sr-only">
        {keys.spoken}
      </p>
      <SideColumn
        sideLabel="Plan, waiting list and pianists"
        side={
          <DaySide
            day={day}
            accompanists={accompanists}
            locale={locale}
            onPlace={place}
            onOpen={(singer) => setOpened(singer.signUpId)}
          />
        }
      >
        {day.may.plan && (
          <div className="mb-2 flex min-h-11 flex-wrap items-center gap-3 text-sm text-ink-2 print:hidden">
            {keys.carrying ? (
              <>
                <span>
                  <strong className="text-ink">{keys.carrying.name}</strong> is picked up: press a
                  slot, or choose with the arrow keys and Enter.
                </span>
                <Button size="small" onClick={keys.letGo}>
                  Leave as it was
                </Button>
              </>
            ) : (
              <span>
                Drag a singer, or press one and then a slot. By keyboard: Enter, arrow keys, Enter;
                Esc leaves it.
              </span>
            )}
          </div>
        )}
        <DayColumns
          label={`${longDay(day.localDate, locale)}, rooms side by side`}
          from={
            Math.floor(
              Math.min(...day.rooms.map((room) => minutesOf(room.opensAt, day.zone))) / 30,
            ) * 30
          }
          to={
            Math.ceil(
              Math.max(...day.rooms.map((room) => minutesOf(room.closesAt, day.zone))) / 30,
            ) * 30
          }
          now={
            now && localDay(now, day.zone) === day.localDate
              ? minutesOf(now.toISOString(), day.zone)
              : null
          }
          rooms={day.rooms.map((room) => columnOf(room, day.zone, accompanists))}
          renderSlot={({ item }, room) => (
            <SlotCell
              day={day}
              item={item}
              roomName={room.label}
              keys={keys}
              drag={drag}
              onOpen={(singer) => setOpened(singer.signUpId)}
            />
          )}
        />
      </SideColumn>
      {asking && (
        <AskBeforeMove
          day={day}
          move={asking}
          onLeave={() => setAsking(null)}
          onAgree={() => {
            move(asking);
            setAsking(null);
          }}
        />
      )}
      {singerOpened && (
        <SingerPanel
          key={singerOpened.signUpId}
          day={day}
          singer={singerOpened}
          onMove={request}
          onClose={() => setOpened(null)}
        />
      )}
    </>
  );
}

/** A room as the drawing takes it: singable items, hatched rests, the pianists' lane. */
function columnOf(room: RoomOnDay, zone: string, accompanists: Props["accompanists"]) {
  const span = (part: { startsAt: string; endsAt: string }) => ({
    start: minutesOf(part.startsAt, zone),
    end: minutesOf(part.endsAt, zone),
  });
  const rest = (item: ItemOnDay): string => {
    if (item.kind === "rest")
      return `Pianist rests ${String(span(item).end - span(item).start)} min`;
    const changes =
      room.pianists.some((p) => p.endsAt > item.startsAt && p.endsAt <= item.endsAt) &&
      room.pianists.some((p) => p.startsAt >= item.endsAt);
    return changes ? "Lunch · change of pianist" : "Lunch";
  };
  return {
    id: room.id,
    label: room.name,
    slots: room.items
      .filter((item) => item.kind === "slot" || item.kind === "hold")
      .map((item) => ({ id: item.id, ...span(item), item })),
    rests: room.items
      .filter((item) => item.kind === "rest" || item.kind === "lunch")
      .map((item) => ({ id: item.id, ...span(item), label: rest(item) })),
    pianists: pianistLanes(room).map((piece) => ({
      id: piece.id,
      ...span(piece),
      label: piece.name ?? "no pianist",
      tone:
        piece.name === null
          ? ("clash" as const)
          : (LANE_TONES[
              Math.max(
                0,
                accompanists.findIndex((a) => a.name === piece.name),
              ) % LANE_TONES.length
            ] ?? "smalt"),
    })),
  };
}
