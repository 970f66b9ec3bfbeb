import type { Metadata } from "next";
import { InvitePerson } from "@/app/(season)/_components/invite-person";
import { PositionGroups } from "@/app/(season)/_components/position-groups";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { listCompanyMembers } from "@/lib/data/people";
import { COMPANY_POSITIONS } from "@/lib/schemas/people";
import { endMembership, inviteMember, reopenMembership } from "../actions";

export const metadata: Metadata = { title: "People of the company" };

export default async function MembersPage({ params }: PageProps<"/companies/[companyId]/people">) {
  const { companyId } = await params;
  const actor = await pageActor(`/companies/${companyId}/people`);
  const people = await orNotFound(listCompanyMembers(actor, companyId));
  const into = { companyId, productionId: null };
  return (
    <>
      <PageTitle
        title="People"
        sub="Who looks after the company itself: admins its people, rooms and trail, music directors make its productions. Everyone else belongs to a production."
        actions={
          <InvitePerson
            into={into}
            kinds={COMPANY_POSITIONS}
            invite={inviteMember}
            description="They get a link by e-mail that signs them in. For a position in a production, invite from that production’s people."
          />
        }
      />
      <PositionGroups
        people={people}
        mayManage
        into={into}
        invite={inviteMember}
        end={endMembership}
        reopen={reopenMembership}
      />
    </>
  );
}
