"use client";

import { useQuery } from "@tanstack/react-query";
import { VerdictWords } from "@/components/casting/verdict-words";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Skeleton } from "@/components/ui/skeleton";
import type { GridRole, GridSinger } from "@/lib/client/casting";
import { orRefuse } from "@/lib/client/refusal";
import type { FitDetail } from "@/lib/data/casting/grid";
import { dayOfYear, localDay } from "@/lib/format-dates";
import { pitchName } from "@/lib/music/pitch-name";
import { computeFit } from "../actions";
import { FitSentence } from "./fit-sentence";

function RangesOnFile({ fit, zone, locale }: { fit: FitDetail; zone: string; locale: string }) {
  const { heard, claimed } = fit.singer.ranges;
  const parts = [heard, claimed].flatMap((range) =>
    range
      ? `${range.kind} ${pitchName(range.low)}–${pitchName(range.high)} on ${dayOfYear(localDay(new Date(range.at), zone), locale)}`
      : [],
  );
  return <p className="mt-1 text-xs text-ink-2">Range on file: {parts.join("; ")}.</p>;
}

/** What the server computes for one cell: the fit in a sentence, then number by number. */
export function FitDetails({
  productionId,
  singer,
  role,
  zone,
  locale,
}: {
  productionId: string;
  singer: GridSinger;
  role: GridRole;
  zone: string;
  locale: string;
}) {
  const { data, error, refetch } = useQuery({
    // A range that is heard anew, or a line that changes, is another question.
    queryKey: ["fit", productionId, role.id, singer.personId, singer.range, role.line],
    queryFn: () =>
      orRefuse(computeFit({ productionId, roleId: role.id, personId: singer.personId })),
    staleTime: 60_000,
    retry: false,
  });
  if (error) {
    return (
      <Notice
        tone="caution"
        title={error.message}
        actions={
          <Button size="small" onClick={() => void refetch()}>
            Compute it again
          </Button>
        }
      />
    );
  }
  if (!data) {
    return (
      <div role="status" className="flex min-h-28 flex-col gap-2">
        <span className="sr-only">The fit is being computed</span>
        <Skeleton className="h-5 w-full" />
        <Skeleton className="h-5 w-4/5" />
        <Skeleton className="mt-2 h-16 w-full" />
      </div>
    );
  }
  return (
    <div className="min-h-28 text-sm">
      <FitSentence fit={data} />
      <RangesOnFile fit={data} zone={zone} locale={locale} />
      <ul aria-label="Number by number" className="mt-3 border-t border-rule">
        {data.numbers.map((number) => (
          <li
            key={number.numberId}
            className="grid grid-cols-[auto_minmax(0,1fr)_auto] items-baseline gap-x-2.5 border-b border-rule py-1.5"
          >
            <RehearsalMark>{number.label}</RehearsalMark>
            <span className="min-w-0">
              <cite>{number.title}</cite>{" "}
              <span className="text-xs whitespace-nowrap text-ink-2">
                {pitchName(number.line.low)}–{pitchName(number.line.high)}
              </span>
            </span>
            <VerdictWords
              verdict={number.fit.verdict}
              words={number.words}
              className="max-w-24 text-right"
            />
          </li>
        ))}
      </ul>
    </div>
  );
}
