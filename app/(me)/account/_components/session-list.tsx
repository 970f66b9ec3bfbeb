import { signOut } from "@/app/_frame/actions";
import { Chip } from "@/components/ui/chip";
import { dayOfYear } from "@/lib/format-dates";
import { endOtherSessions, endSession } from "../actions";
import { ActButton } from "./act-button";

type Session = { id: string; device: string; startedAt: Date; current: boolean };

/** More than most people have; the rest unfolds. */
const SHOWN = 6;

/** The devices that are signed in; each can be ended, or all but this one. */
export function SessionList({ sessions }: { sessions: readonly Session[] }) {
  const here = sessions.filter((session) => session.current);
  const others = sessions.filter((session) => !session.current);
  const folded = others.slice(SHOWN);
  return (
    <>
      <ul className="border-t border-rule">
        {[...here, ...others.slice(0, SHOWN)].map((session) => (
          <SessionItem key={session.id} session={session} />
        ))}
      </ul>
      {folded.length > 0 && (
        <details>
          <summary className="flex min-h-11 items-center font-bold text-smalt">
            {folded.length} more
          </summary>
          <ul className="border-t border-rule">
            {folded.map((session) => (
              <SessionItem key={session.id} session={session} />
            ))}
          </ul>
        </details>
      )}
      {others.length > 0 && (
        <p className="mt-3">
          <ActButton
            label="End all others"
            act={endOtherSessions.bind(null, {})}
            said="All other sessions are ended."
          />
        </p>
      )}
    </>
  );
}

function SessionItem({ session }: { session: Session }) {
  return (
    <li className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2">
      <div className="min-w-0">
        <p className="flex flex-wrap items-center gap-2 font-bold">
          {session.device} {session.current && <Chip tone="info">this one</Chip>}
        </p>
        <p className="text-sm text-ink-2">
          since {dayOfYear(session.startedAt.toISOString().slice(0, 10))}
        </p>
      </div>
      {session.current ? (
        <ActButton label="Sign out" act={signOut.bind(null, undefined)} said="Signed out." />
      ) : (
        <ActButton
          label="End"
          spoken={`End the session of ${session.device}`}
          act={endSession.bind(null, { sessionId: session.id })}
          said={`Ended: ${session.device}.`}
        />
      )}
    </li>
  );
}
