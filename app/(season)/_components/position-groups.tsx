import { SectionTitle } from "@/components/layout/page-title";
import type { PersonListed } from "@/lib/data/people";
import { groupBy } from "@/lib/group-by";
import { POSITION_KINDS, POSITION_NAMES } from "@/lib/permissions/position-kinds";
import type { Into, Invite } from "./invite-person";
import { PositionActs } from "./position-acts";
import type { ChangePosition } from "./position-acts";

const STANDING: Record<PersonListed["standing"], string> = {
  joined: "Signs in",
  invited: "Invited, has not come yet",
  "not invited": "Has no invitation",
};

export type PositionGroupsProps = {
  people: readonly PersonListed[];
  mayManage: boolean;
  into: Into;
  invite: Invite;
  end: ChangePosition;
  reopen: ChangePosition;
};

/** People by position, with how they stand, contacts where the reader has them, and what can be done. */
export function PositionGroups({ people, mayManage, into, ...acts }: PositionGroupsProps) {
  const groups = groupBy(people, (person) => person.kind);
  return (
    <div className="flex flex-col gap-9">
      {POSITION_KINDS.flatMap((kind) => {
        const held = groups.get(kind) ?? [];
        if (held.length === 0) return [];
        return [
          <section key={kind} aria-labelledby={`position-${kind}`}>
            <SectionTitle id={`position-${kind}`} ruled>
              {POSITION_NAMES[kind]}
              {held.length > 1 && (
                <span className="font-sans text-sm text-ink-2"> {held.length}</span>
              )}
            </SectionTitle>
            <ul>
              {held.map((person) => (
                <li
                  key={person.positionId}
                  className="grid grid-cols-1 gap-x-6 gap-y-1 border-b border-rule py-3 md:grid-cols-[minmax(0,15rem)_minmax(0,1fr)_minmax(0,12rem)_10.5rem] md:items-center"
                >
                  <p className="min-w-0 font-bold">
                    {person.name}
                    {person.pronouns !== null && (
                      <span className="font-normal text-ink-2"> ({person.pronouns})</span>
                    )}
                  </p>
                  <p className="flex min-w-0 flex-wrap gap-x-4 text-sm">
                    {person.email !== null && (
                      <a href={`mailto:${person.email}`} className="row-link font-normal break-all">
                        {person.email}
                      </a>
                    )}
                    {person.phone !== null && (
                      <a
                        href={`tel:${person.phone.replace(/[^+\d]/g, "")}`}
                        className="row-link font-normal"
                      >
                        {person.phone}
                      </a>
                    )}
                  </p>
                  <p className="text-sm text-ink-2">{STANDING[person.standing]}</p>
                  {mayManage && <PositionActs person={person} into={into} {...acts} />}
                </li>
              ))}
            </ul>
          </section>,
        ];
      })}
    </div>
  );
}
