import { SectionTitle } from "@/components/layout/page-title";
import { countAnswers, type Draft } from "@/lib/client/callbacks";

/** How those who were told have answered, in numbers. */
export function AnswersSummary({ draft }: { draft: Draft }) {
  const { sent, yes, no, open } = countAnswers(draft);
  if (sent === 0) return null;
  const rows: [string, number][] = [
    ["will come", yes],
    ["can’t come", no],
    ["no answer yet", open],
  ];
  return (
    <section>
      <SectionTitle>Answers</SectionTitle>
      <dl className="flex gap-6">
        {rows.map(([name, count]) => (
          <div key={name} className="flex flex-col-reverse">
            <dt className="text-xs text-ink-2">{name}</dt>
            <dd className="font-serif text-3xl leading-none">{count}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
