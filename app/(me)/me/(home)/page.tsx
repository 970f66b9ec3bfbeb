import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnSlots } from "@/lib/data/auditions/own";
import { listOwnCallbacks } from "@/lib/data/callbacks/own";
import { listOwnCalls } from "@/lib/data/calls/own";
import { listOwnConflicts } from "@/lib/data/conflicts";
import { listOwnInvitations } from "@/lib/data/invitations";
import { listOwnRecords } from "@/lib/data/me";
import { listOwnSessions } from "@/lib/data/pianists/own";
import { listProductions } from "@/lib/data/productions";
import { listOwnSheets } from "@/lib/data/sheets/own";
import { localDay } from "@/lib/format-dates";
import type { Actor } from "@/lib/permissions/types";
import { BeforeThen } from "./_components/before-then";
import { chooseDecision } from "./_components/choose-decision";
import { DecisionShown } from "./_components/decision-shown";
import { NothingYet } from "./_components/nothing-yet";
import { OwnProductions } from "./_components/own-productions";
import { OwnRanges } from "./_components/own-ranges";
import { StillToAnswer } from "./_components/still-to-answer";
import { fromWork, inOrder } from "./_components/upcoming";
import { UpcomingList } from "./_components/upcoming-list";

export const metadata: Metadata = { title: "My page" };

/** Everything that is this person's own, read at once. */
async function readOwn(actor: Actor) {
  // A sheet is worth reading until its day is over everywhere the person works.
  const since = localDay(new Date(), "Pacific/Pago_Pago");
  const [invitations, slots, callbacks, sheets, calls, sessions, records, conflicts, productions] =
    await Promise.all([
      listOwnInvitations(actor),
      listOwnSlots(actor),
      listOwnCallbacks(actor),
      listOwnSheets(actor, { since }),
      listOwnCalls(actor),
      listOwnSessions(actor),
      listOwnRecords(actor),
      listOwnConflicts(actor),
      listProductions(actor),
    ]);
  return {
    invitations,
    slots,
    callbacks,
    sheets,
    calls,
    sessions,
    records,
    conflicts,
    productions,
  };
}

export default async function MyPage({ searchParams }: PageProps<"/me">) {
  const actor = await pageActor("/me");
  const { answer } = await searchParams;
  const own = await readOwn(actor);
  const { shown, waiting, upcoming } = chooseDecision(own, answer, new Date());
  if (own.records.length === 0 && shown === null) return <NothingYet email={actor.email} />;
  return (
    <div className="flex flex-col gap-10">
      {shown === null ? (
        <PageTitle title="My page" sub="Nothing needs your answer." />
      ) : (
        <DecisionShown decision={shown} />
      )}
      <StillToAnswer waiting={waiting} />
      <UpcomingList items={inOrder([...upcoming, ...fromWork(own.calls, own.sessions)])} />
      <OwnRanges records={own.records} />
      {own.records.length > 0 && <BeforeThen conflicts={own.conflicts} />}
      <OwnProductions productions={own.productions} />
    </div>
  );
}
