import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readScoreView } from "@/lib/data/score/page";
import { LineColumn } from "../_components/line-column";
import { NumberColumn } from "../_components/number-column";
import { OctaveChip } from "../_components/octave-chip";
import { RoleColumn } from "../_components/role-column";
import { AddNumberButton, AddRoleButton, ReadScoreButton } from "../_components/score-buttons";
import { ScoreEmpty } from "../_components/score-empty";
import { ScoreList } from "../_components/score-list";
import { ScoreMatrix } from "../_components/score-matrix";
import { scoreInWords } from "../_components/score-in-words";
import { selectionOf } from "../_components/selection";

export const metadata: Metadata = { title: "Score" };

export default async function ScorePage({
  params,
  searchParams,
}: PageProps<"/productions/[productionId]/score">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/score`);
  const view = await orNotFound(readScoreView(actor, productionId));
  const { role, number } = selectionOf(view, await searchParams);
  const area = { productionId, view };
  const actions = view.mayChange && (
    <>
      <AddRoleButton productionId={productionId} />
      <AddNumberButton productionId={productionId} />
      <ReadScoreButton productionId={productionId} />
    </>
  );
  if (view.numbers.length === 0 && view.roles.length === 0) {
    return (
      <>
        <PageTitle title="Score" />
        <ScoreEmpty actions={actions} />
      </>
    );
  }
  return (
    <>
      <PageTitle
        title="Score"
        sub={scoreInWords(view)}
        chips={<OctaveChip {...area} />}
        actions={actions}
      />
      <div className="grid grid-cols-1 gap-8 lg:grid-cols-[minmax(0,1fr)_20rem] xl:grid-cols-[minmax(0,1fr)_27.5rem] xl:gap-10">
        <div className="min-w-0">
          <ScoreMatrix {...area} role={role} number={number} />
          <ScoreList {...area} />
        </div>
        <aside
          id="side"
          aria-label="What is selected"
          className="flex min-w-0 scroll-mt-4 flex-col gap-8 lg:sticky lg:top-4 lg:self-start"
        >
          {role && number && <LineColumn {...area} role={role} number={number} />}
          {!role && number && <NumberColumn {...area} number={number} />}
          {role && <RoleColumn {...area} role={role} />}
        </aside>
      </div>
    </>
  );
}
