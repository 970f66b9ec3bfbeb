import type { Metadata } from "next";
import { cookies } from "next/headers";
import { ModeSwitch } from "@/components/layout/mode-switch";
import { MODE_COOKIE, readMode } from "@/components/layout/mode";
import { PageTitle, SectionTitle } from "@/components/layout/page-title";
import { pageActor } from "@/lib/auth/get-actor";
import { currentSessionToken } from "@/lib/auth/session-cookie";
import { asksForPassword, readAccount } from "@/lib/data/account";
import { listSessions } from "@/lib/data/sessions";
import { listTokens } from "@/lib/data/tokens";
import { NameForm } from "./_components/name-form";
import { OwnData } from "./_components/own-data";
import { PasswordPart } from "./_components/password-part";
import { SessionList } from "./_components/session-list";
import { TokenPart } from "./_components/token-part";

export const metadata: Metadata = { title: "Account" };

export default async function AccountPage() {
  const actor = await pageActor("/account");
  const current = await currentSessionToken();
  const [account, asks, sessions, tokens] = await Promise.all([
    readAccount(actor),
    asksForPassword(actor, current),
    listSessions(actor, current),
    listTokens(actor),
  ]);
  const mode = readMode((await cookies()).get(MODE_COOKIE)?.value);
  return (
    <div className="flex flex-col gap-12">
      <div>
        <PageTitle title="Account" sub={<span className="break-all">{account.email}</span>} />
        <NameForm name={account.name} />
      </div>
      <section aria-labelledby="password">
        <SectionTitle id="password">Password</SectionTitle>
        <PasswordPart
          email={account.email}
          isSet={account.passwordSetAt !== null}
          asksForCurrent={asks}
        />
      </section>
      <section aria-labelledby="sessions">
        <SectionTitle id="sessions">Where you are signed in</SectionTitle>
        <SessionList sessions={sessions} />
      </section>
      <section aria-labelledby="tokens">
        <SectionTitle id="tokens">Tokens for programs</SectionTitle>
        <TokenPart tokens={tokens} />
      </section>
      <section aria-labelledby="reading">
        <SectionTitle id="reading">Reading</SectionTitle>
        <p className="mb-3 text-ink-2">
          Lamp mode is dark, for the pit, the wings and the piano in a dim room. It is kept on this
          device.
        </p>
        <ModeSwitch initial={mode} />
      </section>
      <section aria-labelledby="data">
        <SectionTitle id="data">What is written down about you</SectionTitle>
        <OwnData account={account} />
      </section>
    </div>
  );
}
