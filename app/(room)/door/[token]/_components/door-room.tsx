import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import type { DoorItem, DoorView } from "@/lib/auditions/door-view";
import { formatDuration } from "@/components/ui/format-duration";
import { clock } from "@/lib/format-dates";
import type { DoorAct } from "@/lib/schemas/auditions";

type OpenDoor = Extract<DoorView, { open: true }>;
type Props = {
  room: OpenDoor["rooms"][number];
  view: OpenDoor;
  onAct: (signUpId: string, act: DoorAct) => void;
};

const minutes = (from: string, to: string): number =>
  Math.round((Date.parse(to) - Date.parse(from)) / 60_000);

/** How far the room is behind its times: by when the last one went in, or by how long the next one waits. */
function lateness(room: Props["room"], now: string): number {
  const inside = room.items.find((item) => item.state === "inside");
  if (inside?.inAt)
    return Math.max(minutes(inside.startsAt, inside.inAt), minutes(inside.endsAt, now), 0);
  const next = room.items.find(
    (item) => item.kind === "singer" && (item.state === "here" || item.state === "not here yet"),
  );
  return next ? Math.max(0, minutes(next.startsAt, now)) : 0;
}

/** One room: who is inside, who is next, one big button each. */
export function DoorRoom({ room, view, onAct }: Props) {
  const at = (iso: string) => clock(new Date(iso), view.zone);
  const inside = room.items.find((item) => item.state === "inside");
  const last = room.items.findLastIndex(
    (item) => item.state === "heard" || item.state === "inside",
  );
  const toCome = room.items.filter((item, index) =>
    item.kind === "singer"
      ? item.state !== "heard" && item.state !== "inside"
      : index > last && item.endsAt > view.now,
  );
  const heard = room.items.filter((item) => item.state === "heard");
  const late = lateness(room, view.now);
  const next = toCome.find((item) => item.state === "here");
  return (
    <>
      <section aria-label="Inside now" className="rounded-lg bg-ink p-4 text-paper">
        <p className="font-serif text-sm tracking-[0.08em] uppercase opacity-90">Inside now</p>
        {inside?.name ? (
          <div className="flex items-end justify-between gap-3">
            <div className="min-w-0">
              <p className="font-serif text-3xl">{inside.name}</p>
              <p className="text-sm">
                in at {at(inside.inAt ?? inside.startsAt)}, {view.slotMinutes} minutes
              </p>
            </div>
            <Button
              size="large"
              className="shrink-0"
              onClick={() => inside.signUpId !== null && onAct(inside.signUpId, "out")}
            >
              Out
            </Button>
          </div>
        ) : (
          <p className="font-serif text-2xl">Nobody</p>
        )}
      </section>
      <p className="my-4" role="status">
        {late > 1 ? (
          <Chip tone="stretch">{`Running ${formatDuration(late)} late`}</Chip>
        ) : (
          <Chip tone="fits">on time</Chip>
        )}
      </p>
      <h2 className="small-caps">Next</h2>
      {toCome.length === 0 && (
        <p className="border-t border-rule py-4">Nobody else is to come in this room.</p>
      )}
      <ul className="border-t border-rule">
        {toCome.map((item) => (
          <li key={item.id} className="border-b border-rule">
            {item.kind === "singer" ? (
              <Line item={item} time={at(item.startsAt)} isNext={item === next} onAct={onAct} />
            ) : (
              <p className="hatched px-1 py-3 text-sm">
                <span className="bg-paper px-1">
                  {at(item.startsAt)}{" "}
                  {item.kind === "lunch"
                    ? `lunch until ${at(item.endsAt)}`
                    : `the pianist rests ${String(minutes(item.startsAt, item.endsAt))} minutes`}
                </span>
              </p>
            )}
          </li>
        ))}
      </ul>
      {heard.length > 0 && (
        <details className="mt-6">
          <summary className="min-h-11 py-2 text-sm text-ink-2">{heard.length} heard</summary>
          <ul className="border-t border-rule">
            {heard.map((item) => (
              <li
                key={item.id}
                className="flex min-h-13 items-center gap-3 border-b border-rule text-sm text-ink-2"
              >
                <b>{at(item.startsAt)}</b>
                <span className="min-w-0 flex-1">{item.name}</span>
                <Button
                  kind="quiet"
                  aria-label={`Send ${item.name ?? "the singer"} in again`}
                  onClick={() => item.signUpId !== null && onAct(item.signUpId, "in")}
                >
                  Send in again
                </Button>
              </li>
            ))}
          </ul>
        </details>
      )}
    </>
  );
}

function Line({
  item,
  time,
  isNext,
  onAct,
}: {
  item: DoorItem;
  time: string;
  isNext: boolean;
  onAct: Props["onAct"];
}) {
  const { signUpId, name, state } = item;
  if (signUpId === null || name === null) return null;
  const here = state === "here";
  return (
    <div className="flex min-h-18 items-center gap-3 py-2">
      <b className="w-12 shrink-0">{time}</b>
      <div className="min-w-0 flex-1">
        <p className="text-base">{name}</p>
        {here ? (
          <p className="flex items-center gap-3 text-sm text-verdigris">
            ● here
            <button
              type="button"
              className="min-h-8 px-1 text-ink-2 underline underline-offset-4"
              aria-label={`${name} is not here after all`}
              onClick={() => onAct(signUpId, "not-here")}
            >
              not after all
            </button>
          </p>
        ) : (
          <p className={state === "not coming" ? "text-sm text-vermilion" : "text-sm text-ink-2"}>
            {state === "not coming" ? "✕ said they cannot come" : "○ not here yet"}
          </p>
        )}
      </div>
      {here ? (
        <Button
          size="large"
          kind={isNext ? "primary" : "secondary"}
          aria-label={`Send ${name} in`}
          onClick={() => onAct(signUpId, "in")}
        >
          Send in
        </Button>
      ) : (
        <Button size="large" aria-label={`${name} is here`} onClick={() => onAct(signUpId, "here")}>
          Here
        </Button>
      )}
    </div>
  );
}
