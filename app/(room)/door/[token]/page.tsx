import type { Metadata } from "next";
import { headers } from "next/headers";
import { LiveData } from "@/components/layout/live-data";
import { orNotFound } from "@/lib/auth/deny";
import { sourceOf } from "@/lib/auth/source-of";
import { readDoor } from "@/lib/data/auditions/door";
import { DoorBoard } from "./_components/door-board";

export const metadata: Metadata = { title: "At the door", referrer: "no-referrer" };

/** The monitor's page: the running order behind a link that works on one day. */
export default async function DoorPage({ params }: PageProps<"/door/[token]">) {
  const { token } = await params;
  const door = await orNotFound(readDoor(token, sourceOf(await headers())));
  return (
    <LiveData>
      <DoorBoard token={token} initial={door} />
    </LiveData>
  );
}
