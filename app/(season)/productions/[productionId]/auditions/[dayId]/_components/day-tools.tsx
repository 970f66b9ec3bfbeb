"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import type { AuditionDayView } from "@/lib/auditions/day-view";
import { DoorLink } from "./door-link";
import { InviteDialog } from "./invite-dialog";

/** What can be done with the day as a whole: print it, open the door, invite. */
export function DayTools({ day }: { day: AuditionDayView }) {
  const [inviting, setInviting] = useState(false);
  const listed = day.rooms
    .flatMap((room) => room.items)
    .filter((item) => item.singer?.state === "listed").length;
  return (
    <>
      <Button asChild>
        <Link href={`/productions/${day.productionId}/auditions/${day.id}/running-order`}>
          Running order
        </Link>
      </Button>
      {day.may.door && <DoorLink day={day} />}
      {day.may.plan && (
        <Button kind="primary" onClick={() => setInviting(true)}>
          {listed > 0 ? `Invite ${String(listed)}` : "Invite"}
        </Button>
      )}
      {inviting && <InviteDialog day={day} onClose={() => setInviting(false)} />}
    </>
  );
}
