import Link from "next/link";
import { Chip } from "@/components/ui/chip";
import type { PianistPlan, SessionListed } from "@/lib/data/pianists/sessions";
import { clock, clockSpan } from "@/lib/format-dates";
import { ChoosePianist } from "./choose-pianist";

const STATES = {
  assigned: "assigned",
  confirmed: "confirmed",
  wanted: "held once the call is published",
} as const;

/** One session: when, what and where, who plays, and what is missing in words. */
export function SessionRow({
  productionId,
  session,
  plan,
}: {
  productionId: string;
  session: SessionListed;
  plan: PianistPlan;
}) {
  const { zone } = session;
  const [only] = session.played;
  return (
    <li className="grid gap-x-6 gap-y-2 border-b border-rule py-3 md:grid-cols-[8rem_minmax(0,1fr)_auto]">
      <p className="font-bold">{clockSpan(session.from, session.to, zone)}</p>
      <div className="min-w-0 text-sm">
        <p className="text-base">
          {session.callId === null ? (
            <Link
              className="row-link"
              href={`/productions/${productionId}/auditions/${session.dayId ?? ""}`}
            >
              {session.title}
            </Link>
          ) : (
            <Link
              className="row-link"
              href={`/productions/${productionId}/rehearsals/${session.callId}`}
            >
              {session.title}
            </Link>
          )}
          <span className="text-ink-2">, {session.room ?? "no room yet"}</span>{" "}
          {session.draft && <Chip tone="info">Draft</Chip>}
        </p>
        {session.played.map((played) => (
          <p key={`${played.personId} ${String(played.from.getTime())}`}>
            {played.name}
            <span className="text-ink-2">
              {" "}
              {clockSpan(played.from, played.to, zone)}, {STATES[played.state]}
            </span>
          </p>
        ))}
        {session.gaps.map((gap) => (
          <p key={String(gap.from.getTime())}>
            <Chip tone="clash">No pianist</Chip> {clockSpan(gap.from, gap.to, zone)}
          </p>
        ))}
      </div>
      {plan.mayAssign &&
        (session.callId !== null && session.version !== null ? (
          <ChoosePianist
            key={`${session.callId} ${String(session.version)}`}
            productionId={productionId}
            callId={session.callId}
            version={session.version}
            call={`${session.title}, ${clock(session.from, zone)}`}
            current={only?.personId ?? null}
            pianists={withCurrent(plan.accompanists, only)}
          />
        ) : (
          <Link
            className="row-link self-center"
            href={`/productions/${productionId}/auditions/${session.dayId ?? ""}`}
          >
            Assign on the day
          </Link>
        ))}
    </li>
  );
}

/** A music director who plays their own call is in the list of that call. */
function withCurrent(
  accompanists: PianistPlan["accompanists"],
  current: { personId: string; name: string } | undefined,
) {
  if (!current || accompanists.some(({ personId }) => personId === current.personId))
    return accompanists;
  return [...accompanists, { personId: current.personId, name: current.name }];
}
