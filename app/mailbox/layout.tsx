import type { ReactNode } from "react";
import { notFound } from "next/navigation";
import { AppFrame } from "@/components/layout/app-frame";
import { Notice } from "@/components/ui/notice";
import { env } from "@/lib/env";

/** Only where the local mail fake runs; elsewhere there is no such page. */
export default function MailboxLayout({ children }: { children: ReactNode }) {
  if (env().MAILBOX_DIR === undefined) notFound();
  return (
    <AppFrame crumbs={[{ label: "Local mailbox", href: "/mailbox" }]}>
      <div className="mx-auto w-full max-w-3xl">
        <Notice tone="caution" title="Local mail, nothing leaves this machine." className="mb-6">
          What Cembalo would have sent is kept here instead, for everyone who can open this page.
        </Notice>
        {children}
      </div>
    </AppFrame>
  );
}
