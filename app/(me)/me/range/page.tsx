import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { EmptyState } from "@/components/ui/empty-state";
import { pageActor } from "@/lib/auth/get-actor";
import { listOwnRecords } from "@/lib/data/me";
import { RangeForm } from "./_components/range-form";

export const metadata: Metadata = { title: "My range" };

export default async function RangePage() {
  const actor = await pageActor("/me/range");
  const records = await listOwnRecords(actor);
  if (records.length === 0) {
    return (
      <>
        <PageTitle title="My range" />
        <EmptyState title="Nobody to tell yet">
          A range belongs to a company’s auditions. Once a company has invited you, give it here.
        </EmptyState>
      </>
    );
  }
  const claimed = records.find((record) => record.ranges.claimed !== null)?.ranges.claimed ?? null;
  return (
    <>
      <PageTitle title="My range" sub="What you sing, from your lowest note to your highest." />
      <RangeForm
        records={records.map(({ personId, company }) => ({ personId, company }))}
        start={{
          range: { low: claimed?.low ?? null, high: claimed?.high ?? null },
          comfortable: {
            low: claimed?.comfortableLow ?? null,
            high: claimed?.comfortableHigh ?? null,
          },
        }}
      />
    </>
  );
}
