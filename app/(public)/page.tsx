import type { Metadata } from "next";
import Link from "next/link";
import { accountOf } from "@/app/_frame/account";
import { signOut } from "@/app/_frame/actions";
import { firstPage } from "@/app/_frame/first-page";
import { AppFrame } from "@/components/layout/app-frame";
import { Button } from "@/components/ui/button";
import { getActor } from "@/lib/auth/get-actor";
import { LinkForm } from "./_components/link-form";
import { StaveOrnament } from "./_components/stave-ornament";

export const metadata: Metadata = { title: { absolute: "Cembalo: the music of a season" } };

const PARTS = [
  {
    title: "Hear them",
    words:
      "Slots that cannot be given twice, the pianist’s rests in their place, and one running order for the door, the table and the piano.",
  },
  {
    title: "Cast them",
    words:
      "What each role really sings, read from the score; who can sing it, where it sits, and by how much it does not.",
  },
  {
    title: "Teach it",
    words:
      "Calls that need only the people they name, clashes shown before anyone is called, and a call sheet everyone can read.",
  },
];

/** What this is, and signing in by one field; whoever is signed in is shown the way on. */
export default async function FrontPage() {
  const actor = await getActor();
  return (
    <AppFrame
      bare
      {...(actor
        ? { account: accountOf(actor, signOut) }
        : {
            status: (
              <Link href="/sign-in" className="py-3 text-lid-text no-underline hover:underline">
                Sign in
              </Link>
            ),
          })}
    >
      <div className="relative overflow-hidden">
        <StaveOrnament className="pointer-events-none absolute top-14 right-0 hidden w-[41.25rem] max-w-[46%] lg:block" />
        <section className="relative px-4 pt-12 pb-14 md:px-8 md:pt-20 lg:min-h-[39rem] lg:pt-24">
          <h1 className="max-w-[52rem] text-[clamp(2.5rem,5vw,4.5rem)] leading-[1.06] tracking-[-0.01em] text-balance">
            <span className="lg:block">The whole season, </span>
            <span className="lg:block">from the first sixteen bars </span>
            <span className="lg:block">to the last call.</span>
          </h1>
          <p className="mt-6 max-w-[38rem] text-lg md:text-xl">
            For the music director at the piano, and the singers, stage managers and pianists who
            have to be in the right room, with the right music, and rested.
          </p>
          <StaveOrnament className="pointer-events-none mt-8 w-full max-w-md lg:hidden" />
          <div className="mt-8 max-w-[33rem]">
            {actor ? (
              <div className="flex flex-wrap items-center gap-x-5 gap-y-3">
                <Button asChild kind="primary" size="large">
                  <Link href={firstPage(actor)}>
                    {firstPage(actor) === "/season" ? "Go to your season" : "Go to your page"}
                  </Link>
                </Button>
                <p className="text-sm text-ink-2">Signed in as {actor.name}.</p>
              </div>
            ) : (
              <>
                <LinkForm labelHidden />
                <p className="mt-3 text-sm text-ink-2">
                  No password needed. Singing for us? Use the link in your invitation.
                </p>
              </>
            )}
          </div>
        </section>
      </div>
      <section
        aria-label="What it does"
        className="grid gap-x-10 gap-y-8 border-t border-rule px-4 pt-9 pb-16 md:grid-cols-3 md:px-8 md:pt-11"
      >
        {PARTS.map((part) => (
          <div key={part.title}>
            <h2 className="text-2xl md:text-[1.75rem]">{part.title}</h2>
            <p className="mt-2 max-w-md">{part.words}</p>
          </div>
        ))}
      </section>
    </AppFrame>
  );
}
