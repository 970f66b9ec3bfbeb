import type { CSSProperties, ReactNode } from "react";
import { clock } from "@/components/ui/format-duration";
import { cx } from "@/components/ui/cx";

/** Anything with a place in the day, in minutes after midnight. */
export type DaySpan = { id: string; start: number; end: number };

export type DayRest = DaySpan & { label: string };

export type DayPianist = DaySpan & {
  label: string;
  /** "clash" where somebody is missing or taken twice; the label says which. */
  tone?: "smalt" | "verdigris" | "ochre" | "clash";
};

export type DayRoom<Slot extends DaySpan> = {
  id: string;
  label: string;
  slots: readonly Slot[];
  rests?: readonly DayRest[];
  pianists?: readonly DayPianist[];
};

export type DayColumnsProps<Slot extends DaySpan> = {
  /** Names the drawing: "Saturday 20 March, two rooms". */
  label: string;
  /** The first and last minute shown. */
  from: number;
  to: number;
  rooms: readonly DayRoom<Slot>[];
  /** Fills a slot's place; must fill it to the edges (size-full). */
  renderSlot: (slot: Slot, room: DayRoom<Slot>) => ReactNode;
  /** The present minute; draws the now-line. */
  now?: number | null;
};

const pianistTone = {
  smalt: "bg-smalt text-paper",
  verdigris: "bg-verdigris text-paper",
  ochre: "bg-ochre text-paper",
  clash: "bg-vermilion text-paper",
};

/** A slot must be 24 px high for a mouse and 44 px for a finger, whatever its length. */
function scale(spans: readonly DaySpan[]): CSSProperties {
  const shortest = Math.min(30, ...spans.map(({ start, end }) => Math.max(1, end - start)));
  return {
    "--ppm-wide": Math.max(2, 25 / shortest).toFixed(3),
    "--ppm-phone": Math.max(3, 45 / shortest).toFixed(3),
  } as CSSProperties;
}

const px = (minutes: number) => `calc(var(--ppm) * ${String(minutes)}px)`;

/** One audition day: rooms as columns of time, rests hatched, the pianist's lane beside the room. */
export function DayColumns<Slot extends DaySpan>({
  label,
  from,
  to,
  rooms,
  renderSlot,
  now,
}: DayColumnsProps<Slot>) {
  const place = ({ start, end }: { start: number; end: number }) => ({
    top: px(start - from),
    height: px(end - start),
  });
  const halfHours = Array.from(
    { length: Math.floor(to / 30) - Math.ceil(from / 30) + 1 },
    (_, index) => (Math.ceil(from / 30) + index) * 30,
  );
  const nowShown = now !== undefined && now !== null && now >= from && now <= to;
  return (
    <div
      role="region"
      aria-label={`${label}; scrolls sideways`}
      tabIndex={0}
      style={scale(rooms.flatMap((room) => [...room.slots]))}
      className="overflow-x-auto [--ppm:var(--ppm-phone)] md:[--ppm:var(--ppm-wide)] print:overflow-visible"
    >
      <div className="flex w-max min-w-full">
        <div className="sticky left-0 z-20 w-14 shrink-0 bg-paper">
          <div className="h-8" />
          <div className="relative" style={{ height: px(to - from) }} aria-hidden="true">
            {halfHours.map((minute) => (
              <span
                key={minute}
                style={{ top: px(minute - from) }}
                className="absolute right-2 -translate-y-1/2 text-sm text-ink-2"
              >
                {clock(minute)}
              </span>
            ))}
            {nowShown && (
              <span
                style={{ top: px(now - from) }}
                className="absolute right-1 z-10 -translate-y-1/2 rounded-sm bg-vermilion px-1 text-sm font-bold text-paper print:hidden"
              >
                {clock(now)}
              </span>
            )}
          </div>
          <div className="h-4" />
        </div>
        <div className="relative flex min-w-0 flex-1 gap-6 pb-4">
          <div
            aria-hidden="true"
            className="pointer-events-none absolute inset-x-0 top-8"
            style={{ height: px(to - from) }}
          >
            {halfHours.map((minute) => (
              <span
                key={minute}
                style={{ top: px(minute - from) }}
                className={cx(
                  "absolute inset-x-0 border-t border-rule",
                  minute % 60 !== 0 && "border-dotted",
                )}
              />
            ))}
          </div>
          {rooms.map((room) => (
            <section key={room.id} aria-label={room.label} className="min-w-72 flex-1">
              <h2 className="h-8 small-caps leading-8 font-normal">{room.label}</h2>
              <div className="relative" style={{ height: px(to - from) }}>
                {(room.rests ?? []).map((rest) => (
                  <p
                    key={rest.id}
                    style={place(rest)}
                    className="absolute right-9 left-0 flex items-center overflow-hidden hatched px-2 text-xs leading-none"
                  >
                    <span className="rounded-sm bg-paper px-1 py-0.5 text-ink-2">{rest.label}</span>
                  </p>
                ))}
                <ul>
                  {room.slots.map((slot) => (
                    <li
                      key={slot.id}
                      style={place(slot)}
                      className="absolute right-9 left-0 pb-[2px]"
                    >
                      {renderSlot(slot, room)}
                    </li>
                  ))}
                </ul>
                {(room.pianists ?? []).map((pianist) => (
                  <p
                    key={pianist.id}
                    style={place(pianist)}
                    className={cx(
                      "absolute right-1 flex w-6 items-center justify-center overflow-hidden rounded-sm text-xs [writing-mode:vertical-rl] print:border print:border-black print:text-black",
                      pianistTone[pianist.tone ?? "smalt"],
                    )}
                  >
                    <span className="sr-only">{`${clock(pianist.start)} to ${clock(pianist.end)}, at the piano: `}</span>
                    {pianist.label}
                  </p>
                ))}
              </div>
            </section>
          ))}
          {nowShown && (
            <p
              style={{ top: `calc(2rem + var(--ppm) * ${String(now - from)}px)` }}
              className="pointer-events-none absolute inset-x-0 z-10 h-0 border-t-2 border-vermilion print:hidden"
            >
              <span className="sr-only">It is now {clock(now)}</span>
            </p>
          )}
        </div>
      </div>
    </div>
  );
}
