import { signOut } from "@/app/_frame/actions";
import { Chip } from "@/components/ui/chip";
import { dayOfYear } from "@/lib/format-dates";
import { endOtherSessions, endSession } from "../actions";
import { ActButton } from "./act-button";

export type SessionListProps = {
  sessions: readonly { id: string; device: string; startedAt: Date; current: boolean }[];
};

/** The devices that are signed in; each can be ended, or all but this one. */
export function SessionList({ sessions }: SessionListProps) {
  const others = sessions.filter((session) => !session.current);
  return (
    <>
      <ul className="border-t border-rule">
        {sessions.map((session) => (
          <li
            key={session.id}
            className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2"
          >
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
        ))}
      </ul>
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
