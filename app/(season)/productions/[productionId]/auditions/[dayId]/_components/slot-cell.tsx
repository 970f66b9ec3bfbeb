"use client";

import { cx } from "@/components/ui/cx";
import { MoreIcon } from "@/components/ui/icons";
import type { AuditionDayView, ItemOnDay, SingerOnDay } from "@/lib/auditions/day-view";
import { clock } from "@/lib/format-dates";
import { StateMark } from "../../_components/state-mark";
import type { SlotDrag } from "./use-slot-drag";
import type { SlotKeys } from "./use-slot-keys";

type Props = {
  day: AuditionDayView;
  item: ItemOnDay;
  roomName: string;
  keys: SlotKeys;
  drag: SlotDrag;
  onOpen: (singer: SingerOnDay) => void;
};

/** What the singer asked for and this slot does not give, in words. */
function outsideTimes(singer: SingerOnDay, starts: string, ends: string): string | null {
  if (singer.notBefore !== null && starts < singer.notBefore)
    return `asked for after ${singer.notBefore}`;
  if (singer.notAfter !== null && ends > singer.notAfter)
    return `asked for before ${singer.notAfter}`;
  return null;
}

/** One slot of the day: its time, who sings, and how far their sign-up has come. */
export function SlotCell({ day, item, roomName, keys, drag, onOpen }: Props) {
  const { singer } = item;
  const time = clock(new Date(item.startsAt), day.zone);
  const outside = singer
    ? outsideTimes(singer, time, clock(new Date(item.endsAt), day.zone))
    : null;
  const carried =
    singer !== null &&
    (keys.carrying?.signUpId === singer.signUpId || drag.dragging?.signUpId === singer.signUpId);
  const target =
    drag.dragging?.over === item.id ||
    (keys.carrying !== null && keys.current === item.id && !carried);
  const current = keys.current === item.id;
  const inside = singer?.attendance === "in";
  const heard = singer?.attendance === "out";
  const label = singer
    ? `${time} ${roomName}, ${singer.name}, ${singer.state}${outside === null ? "" : `, ${outside}`}`
    : `${time} ${roomName}, ${item.kind === "hold" ? "held for a late-comer" : "free"}`;
  return (
    <div
      data-slot={item.id}
      className={cx(
        "flex size-full min-w-0 items-stretch border text-xs leading-none",
        singer ? "border-ink bg-sheet" : "border-dashed border-ink-3 bg-paper text-ink-2",
        inside && "bg-ink text-paper",
        heard && "border-rule text-ink-2",
        carried && "outline-2 outline-offset-1 outline-smalt outline-dashed",
        target && "bg-smalt-wash outline-2 outline-offset-1 outline-smalt",
        outside !== null && !inside && "border-l-4 border-l-ochre",
      )}
    >
      <button
        type="button"
        ref={(element) => keys.register(item.id, element)}
        tabIndex={current ? 0 : -1}
        aria-label={label}
        {...(carried && { "aria-pressed": true })}
        onClick={() => {
          if (drag.wasDrag()) return;
          if (day.may.plan) keys.press(item);
          else if (singer) onOpen(singer);
        }}
        onKeyDown={(event) => keys.onKeyDown(event, item)}
        {...drag.handlers(day.may.plan ? (singer?.signUpId ?? null) : null)}
        className={cx(
          "flex min-w-0 flex-1 items-center gap-2 px-2 text-left select-none",
          singer && day.may.plan && "cursor-grab",
        )}
      >
        <b className={cx(heard && "line-through")}>{time}</b>
        {singer ? (
          <span className="flex min-w-0 flex-1 items-center gap-2 max-md:flex-col max-md:items-start max-md:gap-0.5">
            <span
              className={cx("max-w-full truncate text-sm leading-snug", heard && "line-through")}
            >
              {singer.name}
            </span>
            <span
              className={cx(
                "ml-auto flex shrink-0 items-center gap-2 max-md:ml-0",
                inside ? "text-paper" : "text-ink-2",
              )}
            >
              {singer.bars !== null && <span className="max-xl:hidden">{singer.bars} bars</span>}
              {outside !== null && !inside && (
                <span className="text-ochre max-2xl:hidden">{outside}</span>
              )}
              {inside ? (
                <span>inside</span>
              ) : heard ? (
                <span>heard</span>
              ) : (
                <StateMark state={singer.state} />
              )}
            </span>
          </span>
        ) : (
          <span>{item.kind === "hold" ? "held for a late-comer" : "free"}</span>
        )}
      </button>
      {singer && (
        <button
          type="button"
          tabIndex={current ? 0 : -1}
          aria-label={`More about ${singer.name}: move, range heard`}
          onClick={() => onOpen(singer)}
          className={cx(
            "grid w-8 shrink-0 place-items-center max-md:w-11 print:hidden",
            inside ? "text-paper" : "text-ink hover:bg-bone",
          )}
        >
          <MoreIcon />
        </button>
      )}
    </div>
  );
}
