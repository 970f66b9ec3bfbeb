import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnSlots } from "@/lib/data/auditions/own";
import { listOwnCallbacks } from "@/lib/data/callbacks/own";
import { listOwnConflicts } from "@/lib/data/conflicts";
import { listOwnInvitations } from "@/lib/data/invitations";
import { listOwnRecords } from "@/lib/data/me";
import { listProductions } from "@/lib/data/productions";
import { BeforeThen } from "./_components/before-then";
import { DecisionShown } from "./_components/decision-shown";
import { chooseDecision } from "./_components/choose-decision";
import { NothingYet } from "./_components/nothing-yet";
import { OwnProductions } from "./_components/own-productions";
import { OwnRanges } from "./_components/own-ranges";
import { StillToAnswer } from "./_components/still-to-answer";
import { UpcomingList } from "./_components/upcoming-list";

export const metadata: Metadata = { title: "My page" };

export default async function MyPage({ searchParams }: PageProps<"/me">) {
  const actor = await pageActor("/me");
  const { answer } = await searchParams;
  const [invitations, slots, callbacks, records, conflicts, productions] = await Promise.all([
    listOwnInvitations(actor),
    listOwnSlots(actor),
    listOwnCallbacks(actor),
    listOwnRecords(actor),
    listOwnConflicts(actor),
    listProductions(actor),
  ]);
  const { shown, waiting, upcoming } = chooseDecision(
    { invitations, slots, callbacks },
    answer,
    new Date(),
  );
  if (records.length === 0 && shown === null) return <NothingYet email={actor.email} />;
  return (
    <div className="flex flex-col gap-10">
      {shown === null ? (
        <PageTitle title="My page" sub="Nothing needs your answer." />
      ) : (
        <DecisionShown decision={shown} />
      )}
      <StillToAnswer waiting={waiting} />
      <UpcomingList items={upcoming} />
      <OwnRanges records={records} />
      {records.length > 0 && <BeforeThen conflicts={conflicts} />}
      <OwnProductions productions={productions} />
    </div>
  );
}
