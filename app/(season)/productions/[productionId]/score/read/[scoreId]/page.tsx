import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { Notice } from "@/components/ui/notice";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { scoreReview } from "@/lib/data/score/review";
import { ReviewForm } from "./_components/review-form";

export const metadata: Metadata = { title: "Read a score" };

export default async function ReadingPage({
  params,
}: PageProps<"/productions/[productionId]/score/read/[scoreId]">) {
  const { productionId, scoreId } = await params;
  const actor = await pageActor(`/productions/${productionId}/score/read/${scoreId}`);
  const review = await orNotFound(scoreReview(actor, productionId, scoreId));
  const sung = review.parts.filter((part) => part.vocal).length;
  return (
    <>
      <PageTitle
        title={review.title}
        sub={
          <>
            {review.composer !== null && `${review.composer}. `}
            {review.fileName}: {sung} sung {sung === 1 ? "part" : "parts"} of {review.parts.length}.
            Nothing has changed yet.
          </>
        }
      />
      {review.warnings.length > 0 && (
        <Notice tone="caution" title="The score was read, but:" className="mb-6">
          {review.warnings.join(" ")}
        </Notice>
      )}
      <ReviewForm productionId={productionId} review={review} />
    </>
  );
}
