import type { Account } from "@/lib/data/account";

/** Each company's record of the person, and whom to ask about it. */
export function OwnData({ account }: { account: Account }) {
  return (
    <>
      <p className="max-w-prose text-ink-2">
        Your sign-in holds your name, your address, where you are signed in and, if you set one, a
        hash of your password, never the password itself. Each company keeps a record of its own,
        which only its own people see:
      </p>
      {account.records.length === 0 ? (
        <p className="mt-3">No company has a record of you.</p>
      ) : (
        <dl className="mt-4 border-t border-rule">
          {account.records.map((record) => (
            <div key={record.company} className="border-b border-rule py-3">
              <dt className="font-serif text-lg">{record.company}</dt>
              <dd className="text-sm">
                <p>
                  {[record.name, record.pronouns, record.email, record.phone]
                    .filter((text) => text !== null)
                    .join(" · ")}
                </p>
                {record.positions.length > 0 && (
                  <p className="text-ink-2">{record.positions.join("; ")}</p>
                )}
              </dd>
            </div>
          ))}
        </dl>
      )}
      <p className="mt-4 max-w-prose text-sm text-ink-2">
        Something wrong, or should it be deleted? Ask the company’s admin: the record is theirs to
        correct, and local data protection rules say what they must do and by when. Notes that the
        table made at an audition are not shown here.
      </p>
    </>
  );
}
