import type { Route } from "next";
import Link from "next/link";
import type { ReactNode } from "react";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { SectionTitle } from "@/components/layout/page-title";
import type { Road } from "@/lib/data/season/road";
import { roadSteps } from "./road-steps";

function Step({ mark, children }: { mark: string; children: ReactNode }) {
  return (
    <li className="grid grid-cols-[2.25rem_minmax(0,1fr)] gap-x-3 border-b border-rule py-4">
      <RehearsalMark className="mt-1 justify-self-start">{mark}</RehearsalMark>
      <div className="min-w-0">{children}</div>
    </li>
  );
}

/** The way of a production from its score to its call sheets, marked as a score marks its places. */
export function RoadList({ road }: { road: Road }) {
  return (
    <section aria-labelledby="road">
      <SectionTitle id="road" ruled>
        From the score to the call sheet
      </SectionTitle>
      <ol>
        {roadSteps(road).map((step, index) => (
          <Step key={step.area} mark={String.fromCharCode(65 + index)}>
            <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1">
              <h3 className="text-xl">
                <Link
                  href={step.href as Route}
                  className="inline-block py-0.5 text-ink no-underline hover:underline"
                >
                  {step.title}
                </Link>
              </h3>
              <p className="text-sm font-bold">{step.figure}</p>
            </div>
            <p className="text-sm text-ink-2">{step.words}</p>
          </Step>
        ))}
      </ol>
    </section>
  );
}
