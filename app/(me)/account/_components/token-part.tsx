import { Confirm } from "@/components/ui/confirm";
import { Button } from "@/components/ui/button";
import { dayOfYear } from "@/lib/format-dates";
import { revokeToken } from "../actions";
import { TokenForm } from "./token-form";

export type TokenPartProps = {
  tokens: readonly { id: string; label: string; createdAt: Date; lastUsedAt: Date | null }[];
};

const day = (at: Date): string => dayOfYear(at.toISOString().slice(0, 10));

/** Tokens by which a program of the person's own may use the API in their name. */
export function TokenPart({ tokens }: TokenPartProps) {
  return (
    <>
      <p className="mb-4 max-w-prose text-ink-2">
        A token lets a program of yours use the API in your name. Whoever has it can do what you
        can: give each program its own, and revoke it when it is no longer needed. What the API
        answers is described at{" "}
        <a href="/api/v1/openapi.json" className="text-link">
          /api/v1/openapi.json
        </a>
        .
      </p>
      {tokens.length > 0 && (
        <ul className="mb-6 border-t border-rule">
          {tokens.map((token) => (
            <li
              key={token.id}
              className="flex min-h-14 flex-wrap items-center justify-between gap-x-4 gap-y-1 border-b border-rule py-2"
            >
              <div className="min-w-0">
                <p className="font-bold">{token.label}</p>
                <p className="text-sm text-ink-2">
                  made {day(token.createdAt)} ·{" "}
                  {token.lastUsedAt === null ? "never used" : `last used ${day(token.lastUsedAt)}`}
                </p>
              </div>
              <Confirm
                trigger={
                  <Button size="small" aria-label={`Revoke ${token.label}`}>
                    Revoke
                  </Button>
                }
                title={`Revoke ${token.label}?`}
                confirmLabel="Revoke"
                onConfirm={revokeToken.bind(null, { tokenId: token.id })}
              >
                <p>
                  Programs that use it are refused at once. It cannot be brought back; a new one can
                  be made.
                </p>
              </Confirm>
            </li>
          ))}
        </ul>
      )}
      <TokenForm />
    </>
  );
}
