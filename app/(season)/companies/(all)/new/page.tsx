import type { Metadata } from "next";
import { PageTitle } from "@/components/layout/page-title";
import { pageActor } from "@/lib/auth/get-actor";
import { NewCompanyForm } from "./_components/new-company-form";

export const metadata: Metadata = { title: "Start a company" };

export default async function NewCompanyPage() {
  await pageActor("/companies/new");
  return (
    <>
      <PageTitle
        title="Start a company"
        sub="You become its admin and a music director in it; a first production comes next."
      />
      <NewCompanyForm zones={Intl.supportedValuesOf("timeZone")} />
    </>
  );
}
