import type { Metadata } from "next";
import Link from "next/link";
import { env } from "@/lib/env";

export const metadata: Metadata = { title: "Look in your mail" };

export default function SentPage() {
  return (
    <>
      <h1 className="text-3xl md:text-4xl">Look in your mail</h1>
      <p className="text-lg">
        If that address can be reached, a link is on its way. It signs you in once and is good for
        30 minutes.
      </p>
      {env().MAILBOX_DIR !== undefined && (
        <p>
          This installation sends no mail out:{" "}
          <Link href="/mailbox" className="text-link">
            read it in the local mailbox
          </Link>
          .
        </p>
      )}
      <p className="text-ink-2">
        Nothing after a few minutes? Look among unwanted mail, or{" "}
        <Link href="/sign-in" className="text-link">
          try another address
        </Link>
        .
      </p>
    </>
  );
}
