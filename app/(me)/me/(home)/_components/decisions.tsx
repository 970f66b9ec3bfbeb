import type { Route } from "next";
import Link from "next/link";
import { answerCallback, answerSlot, joinCompany } from "@/app/(me)/actions";
import type { OwnSlot } from "@/lib/data/auditions/own";
import type { OwnCallback } from "@/lib/data/callbacks/own";
import type { OwnInvitation } from "@/lib/data/invitations";
import type { OwnSheetListed } from "@/lib/data/sheets/own";
import { clock, localDay, longDay } from "@/lib/format-dates";
import { Button } from "@/components/ui/button";
import { AnswerButtons } from "./answer-buttons";
import { DecisionFrame, Prepare, WhenAndWhere } from "./decision-frame";

/** "Maren", "Maren and Old Bet", "Maren, Old Bet and Nell". */
const list = (names: readonly string[]): string =>
  new Intl.ListFormat("en-GB", { type: "conjunction" }).format(names);

export function InvitationDecision({ invitation }: { invitation: OwnInvitation }) {
  return (
    <DecisionFrame title="You are invited" sub={`by ${invitation.from ?? invitation.company}`}>
      <p className="text-lg">
        {invitation.position}
        {invitation.production !== null && (
          <>
            {" "}
            of <cite>{invitation.production}</cite>
          </>
        )}
        , {invitation.company}
      </p>
      <AnswerButtons
        answers={[
          {
            label: "Accept",
            action: joinCompany.bind(null, { invitationId: invitation.id }),
            said: `You have joined ${invitation.company}.`,
          },
        ]}
      />
    </DecisionFrame>
  );
}

export function SlotDecision({ slot }: { slot: OwnSlot }) {
  const answer = (given: "confirm" | "decline") =>
    answerSlot.bind(null, { signUpId: slot.signUpId, slotId: slot.slotId, answer: given });
  return (
    <DecisionFrame
      title="Your audition"
      sub={
        <>
          for <cite>{slot.production}</cite>, {slot.company}
        </>
      }
    >
      <WhenAndWhere day={longDay(slot.localDate)} time={clock(slot.startsAt, slot.zone)}>
        Be there by {clock(slot.beThereAt, slot.zone)} · {slot.room}, {slot.venue}
        {slot.address ? `, ${slot.address}` : ""} · done by {clock(slot.endsAt, slot.zone)}
      </WhenAndWhere>
      {slot.song !== null && <Prepare label="You sing">{slot.song}</Prepare>}
      <AnswerButtons
        answers={[
          {
            label: "I’ll be there",
            action: answer("confirm"),
            said: "Confirmed. Change it here until it begins.",
          },
          {
            label: "I can’t",
            action: answer("decline"),
            said: "They know that you can’t. Change it here until it begins.",
          },
        ]}
      />
    </DecisionFrame>
  );
}

export function CallbackDecision({ callback }: { callback: OwnCallback }) {
  const answer = (given: "yes" | "no") =>
    answerCallback.bind(null, { invitationId: callback.invitationId, answer: given });
  const { startsAt, endsAt, zone } = callback;
  return (
    <DecisionFrame
      title="You’re called back"
      sub={
        <>
          for <em>{list(callback.roles)}</em> in <cite>{callback.production}</cite>
        </>
      }
    >
      {startsAt === null ? (
        <p>Day and time follow.</p>
      ) : (
        <WhenAndWhere day={longDay(localDay(startsAt, zone))} time={clock(startsAt, zone)}>
          {callback.room ?? "Place to follow"}
          {endsAt !== null && ` · done by ${clock(endsAt, zone)}`}
        </WhenAndWhere>
      )}
      {callback.material !== null && <Prepare label="Prepare">{callback.material}</Prepare>}
      <AnswerButtons
        answers={[
          {
            label: "I’ll be there",
            action: answer("yes"),
            said: "They know that you’ll be there.",
          },
          { label: "I can’t", action: answer("no"), said: "They know that you can’t." },
        ]}
      />
    </DecisionFrame>
  );
}

export function SheetDecision({ sheet }: { sheet: OwnSheetListed }) {
  return (
    <DecisionFrame
      title={sheet.number === 1 ? "A call sheet for you" : "The call sheet has changed"}
      sub={
        <>
          <cite>{sheet.production}</cite>, {sheet.company} · issue {sheet.number}
        </>
      }
    >
      <WhenAndWhere day={longDay(sheet.localDate)} time={sheet.from ?? "not called"}>
        {sheet.releasedAt === null
          ? "You were called by an earlier issue."
          : `free to go at ${sheet.releasedAt}`}
      </WhenAndWhere>
      <div className="mt-4 flex">
        <Button asChild kind="primary" size="large" className="flex-1">
          <Link href={`/me/call-sheets/${sheet.issueId}` as Route}>Read and acknowledge</Link>
        </Button>
      </div>
    </DecisionFrame>
  );
}
