import type { Metadata, Route } from "next";
import Link from "next/link";
import { PageTitle } from "@/components/layout/page-title";
import { Button } from "@/components/ui/button";
import { EmptyState } from "@/components/ui/empty-state";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { readTrail } from "@/lib/data/trail";
import { TrailTable } from "./_components/trail-table";

export const metadata: Metadata = { title: "Trail" };

const one = (value: string | string[] | undefined): string | undefined =>
  typeof value === "string" && value !== "" ? value : undefined;

/** Who changed what, and when. The form is an ordinary one: its address can be kept and sent. */
export default async function TrailPage({
  params,
  searchParams,
}: PageProps<"/companies/[companyId]/trail">) {
  const { companyId } = await params;
  const query = await searchParams;
  const actor = await pageActor(`/companies/${companyId}/trail`);
  const text = one(query["text"]);
  const trail = await orNotFound(
    readTrail(actor, {
      companyId,
      productionId: one(query["production"]),
      text,
      page: Math.min(Math.trunc(Number(one(query["page"]) ?? 1)) || 1, 10_000),
    }),
  );
  const address = (page: number): Route => {
    const parts = new URLSearchParams({
      ...(trail.production && { production: trail.production.id }),
      ...(text !== undefined && { text }),
      ...(page > 1 && { page: String(page) }),
    });
    const search = parts.toString();
    return `/companies/${companyId}/trail${search === "" ? "" : `?${search}`}` as Route;
  };
  return (
    <>
      <PageTitle
        title="Trail"
        sub={
          trail.production
            ? `Who changed what in ${trail.production.title}, the newest first.`
            : `Who changed what at ${trail.company.name}, the newest first.`
        }
      />
      <form method="get" role="search" className="mb-6 flex flex-wrap items-end gap-3">
        <Field label="Words or a name" className="w-full max-w-xs">
          <Input type="search" name="text" defaultValue={text ?? ""} maxLength={100} />
        </Field>
        {(trail.wholeCompany || trail.productions.length > 1) && (
          <Field label="Where" className="w-full max-w-xs">
            <Select name="production" defaultValue={trail.production?.id ?? ""}>
              {trail.wholeCompany && <option value="">The whole company</option>}
              {trail.productions.map(({ id, title }) => (
                <option key={id} value={id}>
                  {title}
                </option>
              ))}
            </Select>
          </Field>
        )}
        <Button type="submit">Look</Button>
      </form>
      {trail.events.length === 0 ? (
        <EmptyState title={text === undefined ? "Nothing yet" : "Nothing found"}>
          {text === undefined
            ? "Every change to people, rooms, scores, auditions, casting and calls is written here, with who made it."
            : `No change matches “${text}”. Try fewer letters, or look in another place.`}
        </EmptyState>
      ) : (
        <TrailTable trail={trail} />
      )}
      {(trail.page > 1 || trail.hasNext) && (
        <nav aria-label="Pages" className="mt-4 flex gap-6">
          {trail.page > 1 && (
            <Link href={address(trail.page - 1)} className="row-link">
              Newer
            </Link>
          )}
          {trail.hasNext && (
            <Link href={address(trail.page + 1)} className="row-link">
              Older
            </Link>
          )}
        </nav>
      )}
    </>
  );
}
