import { HydrationBoundary, QueryClient, dehydrate } from "@tanstack/react-query";
import type { Metadata } from "next";
import Link from "next/link";
import { Suspense } from "react";
import { LiveData } from "@/components/layout/live-data";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";

import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { asJson } from "@/lib/client/as-json";
import { castingQuery } from "@/lib/client/casting";
import { readCastingGrid } from "@/lib/data/casting/grid";
import { productionFor } from "@/lib/data/guard";
import type { Actor } from "@/lib/permissions/types";
import { CastingBoard } from "./_components/casting-board";
import { CastingLoading } from "./_components/casting-loading";

export const metadata: Metadata = { title: "Casting" };

export default async function CastingPage({
  params,
}: PageProps<"/productions/[productionId]/casting">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/casting`);
  // Before anything streams, so that what is refused answers 404.
  await orNotFound(productionFor(actor, productionId, "casting:see"));
  return (
    <Suspense fallback={<CastingLoading />}>
      <CastingGrid actor={actor} productionId={productionId} />
    </Suspense>
  );
}

async function CastingGrid({ actor, productionId }: { actor: Actor; productionId: string }) {
  const grid = await orNotFound(readCastingGrid(actor, productionId));
  if (grid.roles.length === 0) {
    return (
      <Empty
        title="No roles yet"
        label="Go to the score"
        href={`/productions/${productionId}/score`}
      >
        The grid sets each singer against each role. Read a score or type the roles in first: their
        ranges come from the vocal book.
      </Empty>
    );
  }
  if (grid.singers.length === 0) {
    return (
      <Empty
        title="Nobody is called back yet"
        label="Go to callbacks"
        href={`/productions/${productionId}/callbacks`}
      >
        Singers stand here once they are ticked for a callback, each against each role.
      </Empty>
    );
  }
  const client = new QueryClient();
  client.setQueryData(castingQuery(productionId).queryKey, asJson(grid));
  return (
    <LiveData>
      <HydrationBoundary state={dehydrate(client)}>
        <CastingBoard productionId={productionId} />
      </HydrationBoundary>
    </LiveData>
  );
}

function Empty({
  title,
  label,
  href,
  children,
}: {
  title: string;
  label: string;
  href: `/productions/${string}/score` | `/productions/${string}/callbacks`;
  children: string;
}) {
  return (
    <>
      <PageTitle title="Casting grid" />
      <EmptyState
        title={title}
        action={
          <Button kind="primary" asChild>
            <Link href={href}>{label}</Link>
          </Button>
        }
      >
        {children}
      </EmptyState>
    </>
  );
}
