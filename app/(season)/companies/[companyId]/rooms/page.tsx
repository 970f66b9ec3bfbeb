import type { Metadata } from "next";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readRooms } from "@/lib/data/rooms";
import { RoomDialog } from "./_components/room-dialog";
import { TravelForm } from "./_components/travel-form";
import { VenueDialog } from "./_components/venue-dialog";

export const metadata: Metadata = { title: "Rooms" };

export default async function RoomsPage({ params }: PageProps<"/companies/[companyId]/rooms">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}/rooms`);
  const { company, venues, travel } = await orNotFound(readRooms(actor, companyId));
  const addVenue = <VenueDialog companyId={company.id} />;
  return (
    <>
      <PageTitle
        title="Rooms"
        sub="Where the company hears, rehearses and plays. One room is never given twice at once, by whoever asks."
        {...(venues.length > 0 && { actions: addVenue })}
      />
      {venues.length === 0 ? (
        <EmptyState title="No venue yet" action={addVenue}>
          A venue is a house with one or more rooms in it. Auditions, callbacks and calls are held
          in rooms.
        </EmptyState>
      ) : (
        <div className="flex flex-col gap-9">
          {venues.map((venue) => (
            <section key={venue.id} aria-labelledby={`venue-${venue.id}`}>
              <div className="flex flex-wrap items-end justify-between gap-3 border-b border-rule pb-2">
                <div className="min-w-0">
                  <h2 id={`venue-${venue.id}`} className="text-2xl">
                    {venue.name}
                  </h2>
                  {venue.address !== "" && <p className="text-sm text-ink-2">{venue.address}</p>}
                </div>
                <div className="flex flex-wrap gap-2">
                  <VenueDialog companyId={company.id} venue={venue} />
                  <RoomDialog companyId={company.id} venue={{ id: venue.id, name: venue.name }} />
                </div>
              </div>
              {venue.rooms.length === 0 ? (
                <p className="py-3 text-sm text-ink-2">No room in it yet.</p>
              ) : (
                <ul>
                  {venue.rooms.map((room) => (
                    <li
                      key={room.id}
                      className="grid grid-cols-[minmax(0,1fr)_auto_auto] items-center gap-x-6 border-b border-rule py-2"
                    >
                      <span className="min-w-0 font-bold">{room.name}</span>
                      <span className="text-sm text-ink-2">
                        {room.hasPiano ? "Piano" : "No piano"}
                      </span>
                      <RoomDialog
                        companyId={company.id}
                        venue={{ id: venue.id, name: venue.name }}
                        room={room}
                      />
                    </li>
                  ))}
                </ul>
              )}
            </section>
          ))}
          {venues.length > 1 && (
            <section aria-labelledby="travel">
              <SectionTitle id="travel">Minutes from door to door</SectionTitle>
              <p className="mb-4 max-w-prose text-sm text-ink-2">
                The same both ways. A call that leaves somebody less time than this is shown as a
                clash; where nothing is written, none is counted.
              </p>
              <TravelForm
                key={venues.map((venue) => venue.id).join(" ")}
                companyId={company.id}
                venues={venues.map(({ id, name }) => ({ id, name }))}
                travel={travel}
              />
            </section>
          )}
        </div>
      )}
    </>
  );
}
