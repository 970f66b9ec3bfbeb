import { HydrationBoundary, QueryClient, dehydrate } from "@tanstack/react-query";
import type { Metadata, Route } from "next";
import Link from "next/link";
import { Suspense } from "react";
import { LiveData } from "@/components/layout/live-data";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { asJson } from "@/lib/client/as-json";
import { callbacksQuery } from "@/lib/client/callbacks";
import { readCallbacks } from "@/lib/data/callbacks/draft";
import { productionFor } from "@/lib/data/guard";
import { roomsOfProduction } from "@/lib/data/rooms";
import type { Actor } from "@/lib/permissions/types";
import { CallbacksBoard } from "./_components/callbacks-board";
import { CallbacksLoading } from "./_components/callbacks-loading";
import { StartRound } from "./_components/start-round";

export const metadata: Metadata = { title: "Callbacks" };

export default async function CallbacksPage({
  params,
}: PageProps<"/productions/[productionId]/callbacks">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/callbacks`);
  // Before anything streams, so that what is refused answers 404.
  await orNotFound(productionFor(actor, productionId, "callbacks:read"));
  return (
    <Suspense fallback={<CallbacksLoading />}>
      <Callbacks actor={actor} productionId={productionId} />
    </Suspense>
  );
}

async function Callbacks({ actor, productionId }: { actor: Actor; productionId: string }) {
  const [draft, rooms] = await orNotFound(
    Promise.all([readCallbacks(actor, productionId), roomsOfProduction(actor, productionId)]),
  );
  const missing = firstStep(draft.roles.length, draft.singers.length, productionId);
  if (missing) {
    return (
      <>
        <PageTitle title="Callbacks" />
        <EmptyState
          title={missing.title}
          action={
            <Button kind="primary" asChild>
              <Link href={missing.href}>{missing.label}</Link>
            </Button>
          }
        >
          {missing.words}
        </EmptyState>
      </>
    );
  }
  if (!draft.round) {
    return (
      <>
        <PageTitle title="Callbacks" />
        <EmptyState title="No round yet">
          <p className="mb-4">
            A round is one list: who comes back, for which roles, when and where, and what to
            prepare. Nobody is told before it is published.
          </p>
          {draft.may.publish ? (
            <StartRound productionId={productionId} />
          ) : (
            <p>The music director begins it.</p>
          )}
        </EmptyState>
      </>
    );
  }
  const client = new QueryClient();
  client.setQueryData(callbacksQuery(productionId).queryKey, asJson(draft));
  return (
    <LiveData>
      <HydrationBoundary state={dehydrate(client)}>
        <CallbacksBoard productionId={productionId} rooms={rooms} />
      </HydrationBoundary>
    </LiveData>
  );
}

/** What has to be there before anyone can be called back. */
function firstStep(
  roles: number,
  singers: number,
  productionId: string,
): { title: string; words: string; label: string; href: Route } | null {
  if (roles === 0) {
    return {
      title: "No roles yet",
      words: "Singers are called back for roles. Read a score or type the roles in first.",
      label: "Go to the score",
      href: `/productions/${productionId}/score`,
    };
  }
  if (singers === 0) {
    return {
      title: "Nobody has signed up yet",
      words: "The list is drawn up from those who audition. Add singers to the auditions first.",
      label: "Go to auditions",
      href: `/productions/${productionId}/auditions`,
    };
  }
  return null;
}
