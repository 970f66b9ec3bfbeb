import type { Metadata } from "next";
import { PositionGroups } from "@/app/(season)/_components/position-groups";
import { InvitePerson } from "@/app/(season)/_components/invite-person";
import { PageTitle } from "@/components/layout/page-title";
import { orNotFound } from "@/lib/auth/deny";
import { pageActor } from "@/lib/auth/get-actor";
import { productionFor } from "@/lib/data/guard";
import { listProductionPeople } from "@/lib/data/people";
import { can } from "@/lib/permissions/can";
import { PRODUCTION_POSITIONS } from "@/lib/schemas/people";
import { endPosition, invitePerson, reopenPosition } from "./actions";

export const metadata: Metadata = { title: "People" };

export default async function PeoplePage({
  params,
}: PageProps<"/productions/[productionId]/people">) {
  const { productionId } = await params;
  const actor = await pageActor(`/productions/${productionId}/people`);
  const scope = await orNotFound(productionFor(actor, productionId, "people:read"));
  const people = await listProductionPeople(actor, scope.id);
  const subject = { companyId: scope.companyId, productionId: scope.id };
  const mayManage = can(actor, "positions:manage", subject);
  const into = { companyId: scope.companyId, productionId: scope.id };
  const persons = new Set(people.map((person) => person.personId)).size;
  return (
    <>
      <PageTitle
        title="People"
        sub={`${String(persons)} ${persons === 1 ? "person" : "people"}. A position decides what someone sees and does in this production.${can(actor, "contacts:read", subject) ? "" : " Contacts are with the stage manager and the music director."}`}
        {...(mayManage && {
          actions: (
            <InvitePerson
              into={into}
              kinds={PRODUCTION_POSITIONS}
              invite={invitePerson}
              description="They get a link by e-mail that signs them in, and see what their position needs. Someone the company knows already keeps their record."
            />
          ),
        })}
      />
      <PositionGroups
        people={people}
        mayManage={mayManage}
        into={into}
        invite={invitePerson}
        end={endPosition}
        reopen={reopenPosition}
      />
    </>
  );
}
