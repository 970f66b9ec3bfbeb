"use client";

import { useQuery } from "@tanstack/react-query";
import dynamic from "next/dynamic";
import { useState } from "react";
import { VoiceCaution } from "@/components/casting/voice-caution";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { Chip } from "@/components/ui/chip";
import { Notice } from "@/components/ui/notice";
import { callbacksQuery, isShown, type DraftSinger } from "@/lib/client/callbacks";
import { LOOK_AGAIN } from "@/lib/client/look-again";
import { matches } from "@/lib/client/matches";
import type { RoomChoice } from "@/lib/data/rooms";
import { AnswersSummary } from "./answers-summary";
import { MarksFilter, type MarksView } from "./marks-filter";
import { MarksTable } from "./marks-table";
import { PublishRound } from "./publish-round";
import { RoundForm } from "./round-form";
import { RoundSummary } from "./round-summary";
import { useMarks } from "./use-marks";

// Wanted now and then: fetched when it is.
const HearRange = dynamic(() => import("./hear-range"));
const NextRound = dynamic(() => import("./next-round"));

const told = (count: number) =>
  count === 0 ? "Everything is sent" : `${String(count)} not sent yet`;

/** The callback list, kept up to date while the table looks at it together. */
export function CallbacksBoard({
  productionId,
  rooms,
}: {
  productionId: string;
  rooms: readonly RoomChoice[];
}) {
  const marks = useMarks(productionId);
  const { data: draft, error } = useQuery({
    ...callbacksQuery(productionId),
    // An answer that left before the tick arrived would take it off the screen again.
    refetchInterval: marks.busy ? false : LOOK_AGAIN,
  });
  const [view, setView] = useState<MarksView>({ typed: "", roleId: "", shown: "everyone" });
  const [hearing, setHearing] = useState<DraftSinger | null>(null);
  if (!draft?.round) return null;
  const { round } = draft;

  const roles = draft.roles.filter((role) => view.roleId === "" || role.id === view.roleId);
  const singers = draft.singers.filter(
    (singer) => matches(singer.name, view.typed) && isShown(singer, draft.roles, roles, view.shown),
  );
  const marked = draft.singers.filter((singer) => singer.marks.length > 0).length;
  const unsent = draft.singers.filter((singer) => singer.unsent !== "none").length;
  const published = round.issue > 0;

  return (
    <>
      <PageTitle
        title={round.title}
        sub={
          published
            ? "Each person sees what was last published to them, and answers on their own page."
            : "A draft for the music team and the table. Nobody called back sees it before it is published."
        }
        chips={
          <>
            <Chip>
              {marked} of {draft.singers.length} called back
            </Chip>
            <Chip tone={!published ? "plain" : unsent > 0 ? "stretch" : "fits"}>
              {published ? told(unsent) : "Not published yet"}
            </Chip>
          </>
        }
        {...(draft.may.publish && {
          actions: <PublishRound productionId={productionId} draft={draft} round={round} />,
        })}
      />
      {error && (
        <Notice tone="caution" live className="mb-4" title="The list may be old.">
          {error.message}
        </Notice>
      )}
      <SideColumn
        sideLabel="When and where, and the answers"
        side={
          <div className="flex flex-col gap-8 lg:sticky lg:top-4 lg:max-h-[calc(100dvh-2rem)] lg:overflow-y-auto lg:pb-4">
            <AnswersSummary draft={draft} />
            <section className="flex flex-col gap-1">
              <SectionTitle>When and where</SectionTitle>
              {draft.may.publish ? (
                <RoundForm key={round.id} productionId={productionId} round={round} rooms={rooms} />
              ) : (
                <RoundSummary round={round} />
              )}
              {draft.may.publish && published && <NextRound productionId={productionId} />}
            </section>
            <VoiceCaution />
          </div>
        }
      >
        <MarksFilter view={view} onChange={setView} roles={draft.roles} published={published}>
          {singers.length === draft.singers.length
            ? `${String(singers.length)} singers`
            : `${String(singers.length)} of ${String(draft.singers.length)}`}
        </MarksFilter>
        <MarksTable
          draft={draft}
          singers={singers}
          roles={roles}
          onMark={(mark) => marks.mark({ ...mark, roundId: round.id })}
          onHear={setHearing}
        />
      </SideColumn>
      {hearing && (
        <HearRange
          key={hearing.personId}
          productionId={productionId}
          singer={hearing}
          onClose={() => setHearing(null)}
        />
      )}
    </>
  );
}
