import type { Metadata } from "next";
import Link from "next/link";
import { Fragment } from "react";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import type { AuditionDayView, RoomOnDay } from "@/lib/auditions/day-view";
import { pianistLanes } from "@/lib/auditions/pianist-lanes";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readDay } from "@/lib/data/auditions/day-view";
import { productionFor } from "@/lib/data/guard";
import { clock, clockSpan, longDay } from "@/lib/format-dates";
import { PrintButton } from "./_components/print-button";

export const metadata: Metadata = { title: "Running order" };

/** The running order and sign-in sheet of a day, a room to a sheet, for paper. No address or telephone stands on it. */
export default async function RunningOrderPage({
  params,
}: PageProps<"/productions/[productionId]/auditions/[dayId]/running-order">) {
  const { productionId, dayId } = await params;
  const actor = await pageActor(`/productions/${productionId}/auditions/${dayId}/running-order`);
  const [scope, day] = await orNotFound(
    Promise.all([
      productionFor(actor, productionId, "auditions:read"),
      readDay(actor, productionId, dayId),
    ]),
  );
  return (
    <>
      <div className="print:hidden">
        <PageTitle
          title="Running order"
          sub={`${longDay(day.localDate, scope.locale)}. Singers initial on arrival; nobody signs for another.`}
          actions={
            <>
              <Button asChild>
                <Link href={`/productions/${productionId}/auditions/${dayId}`}>
                  Back to the day
                </Link>
              </Button>
              <PrintButton />
            </>
          }
        />
      </div>
      {day.rooms.map((room, index) => (
        <section
          key={room.id}
          className={index > 0 ? "mt-10 print:mt-0 print:break-before-page" : ""}
        >
          <header className="mb-3">
            <h2 className="text-2xl">
              <em>{scope.title}</em>: {room.name}, {longDay(day.localDate, scope.locale)}
            </h2>
            <p className="text-sm">
              {room.venue}, {clockSpan(new Date(room.opensAt), new Date(room.closesAt), day.zone)}.
              At the piano:{" "}
              {pianistLanes(room)
                .map(
                  (piece) =>
                    `${piece.name ?? "no pianist"} ${clockSpan(new Date(piece.startsAt), new Date(piece.endsAt), day.zone)}`,
                )
                .join("; ")}
              .
            </p>
          </header>
          <RoomSheet day={day} room={room} />
        </section>
      ))}
    </>
  );
}

function RoomSheet({ day, room }: { day: AuditionDayView; room: RoomOnDay }) {
  const at = (iso: string) => clock(new Date(iso), day.zone);
  // On paper a room of some 38 lines fits one sheet of A4 or Letter.
  const cell = "border-b border-rule px-2 py-1.5 text-left align-top print:py-0.5";
  return (
    <div
      role="region"
      aria-label={`Running order, ${room.name}`}
      tabIndex={0}
      className="overflow-x-auto print:overflow-visible"
    >
      <table className="w-full border-collapse text-sm print:text-xs">
        <caption className="sr-only">Running order, {room.name}</caption>
        <thead>
          <tr className="border-y-2 border-ink">
            {["Time", "Name", "Song, bars", "State", "Initial", "In", "Out"].map((head) => (
              <th key={head} scope="col" className="px-2 py-1.5 text-left print:py-0.5">
                {head}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {room.items.map((item) => (
            <Fragment key={item.id}>
              {item.kind === "rest" || item.kind === "lunch" ? (
                <tr>
                  <th scope="row" className={cell}>
                    {at(item.startsAt)}
                  </th>
                  <td colSpan={6} className={`${cell} hatched`}>
                    <span className="bg-paper px-1">
                      {item.kind === "lunch"
                        ? `Lunch, until ${at(item.endsAt)}`
                        : `The pianist rests until ${at(item.endsAt)}`}
                    </span>
                  </td>
                </tr>
              ) : (
                <tr>
                  <th scope="row" className={cell}>
                    {at(item.startsAt)}
                  </th>
                  <td className={`${cell} font-bold`}>{item.singer?.name ?? ""}</td>
                  <td className={cell}>
                    {[
                      item.singer?.song,
                      item.singer?.bars ? `${String(item.singer.bars)} bars` : null,
                    ]
                      .filter(Boolean)
                      .join(", ")}
                  </td>
                  <td className={cell}>
                    {item.singer ? item.singer.state : item.kind === "hold" ? "held" : ""}
                  </td>
                  <td className={`${cell} min-w-16 border-x`} />
                  <td className={`${cell} min-w-14 border-r`} />
                  <td className={`${cell} min-w-14`} />
                </tr>
              )}
            </Fragment>
          ))}
        </tbody>
      </table>
    </div>
  );
}
