import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { EmptyState } from "@/components/ui/empty-state";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnConflicts } from "@/lib/data/conflicts";
import { listOwnRecords } from "@/lib/data/me";
import { localDay } from "@/lib/format-dates";
import { ConflictForm } from "./_components/conflict-form";
import { ConflictList } from "./_components/conflict-list";

export const metadata: Metadata = { title: "When I can’t come" };

export default async function ConflictsPage() {
  const actor = await pageActor("/me/conflicts");
  const [records, conflicts] = await Promise.all([listOwnRecords(actor), listOwnConflicts(actor)]);
  const first = records[0];
  if (!first) {
    return (
      <>
        <PageTitle title="When you can’t come" />
        <EmptyState title="Nobody to tell yet">
          Impossible dates go to the companies you work with. Once one has invited you, tell it
          here.
        </EmptyState>
      </>
    );
  }
  return (
    <>
      <PageTitle
        title="When you can’t come"
        sub="Calls are planned round these dates once the company has agreed to them."
      />
      <ConflictList conflicts={conflicts} namesCompany={records.length > 1} />
      <ConflictForm
        records={records.map(({ personId, company }) => ({ personId, company }))}
        today={localDay(new Date(), first.zone)}
      />
    </>
  );
}
