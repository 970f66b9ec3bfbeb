import Link from "next/link";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { pitchName } from "@/lib/music/pitch-name";
import { signatureInWords } from "@/lib/score/keys";
import { formatLength } from "@/lib/score/number-length";
import { drawnLine } from "@/lib/score/score-view";
import type { ScoreNumber, ScoreView } from "@/lib/score/score-view";
import { MoveNumberButtons } from "./move-number-buttons";
import { RemoveNumberButton } from "./remove-buttons";
import { EditNumberButton } from "./score-buttons";
import { scoreHref } from "./selection";

type Props = { productionId: string; view: ScoreView; number: ScoreNumber };

function factsOf(number: ScoreNumber): [string, string][] {
  const key =
    number.keyName ?? (number.keyFifths === null ? "" : signatureInWords(number.keyFifths));
  const facts: [string, string][] = [
    ["Key", key],
    ["Metre", number.metre ?? ""],
    ["Tempo", number.tempo === null ? "" : `${String(number.tempo)} crotchets a minute`],
    ["Bars", number.bars === null ? "" : String(number.bars)],
    ["Length", number.seconds === null ? "" : formatLength(number.seconds)],
    ["Read from", number.fileName ?? ""],
  ];
  return facts.filter(([, value]) => value !== "");
}

/** One number: what is known of it, who sings, and its place in the order. */
export function NumberColumn({ productionId, view, number }: Props) {
  const place = view.numbers.findIndex((each) => each.id === number.id);
  const singing = view.roles.flatMap((role) => {
    const drawn = drawnLine(
      view.lines.filter((line) => line.roleId === role.id && line.numberId === number.id),
    );
    return drawn ? [{ role, drawn }] : [];
  });
  return (
    <section aria-labelledby="number-title" className="flex flex-col gap-5">
      <h2 id="number-title" className="flex items-center gap-3 text-2xl">
        <RehearsalMark>{number.label}</RehearsalMark>
        <em className="text-[1em]">{number.title}</em>
      </h2>
      <dl className="grid grid-cols-[auto_minmax(0,1fr)] gap-x-4 gap-y-1 text-sm">
        {factsOf(number).map(([name, value]) => (
          <div key={name} className="col-span-2 grid grid-cols-subgrid">
            <dt className="text-ink-2">{name}</dt>
            <dd className="wrap-anywhere">{value}</dd>
          </div>
        ))}
      </dl>
      <div>
        <h3 className="border-b border-rule pb-2 font-sans text-sm font-bold">Who sings</h3>
        {singing.length === 0 ? (
          <p className="py-2 text-sm text-ink-2">
            Nobody: an instrumental number, or its lines are not in yet.
          </p>
        ) : (
          <ul>
            {singing.map(({ role, drawn }) => (
              <li
                key={role.id}
                className="flex justify-between gap-4 border-b border-rule py-1.5 text-sm"
              >
                <Link
                  href={scoreHref(productionId, { role: role.id, number: number.id })}
                  scroll={false}
                  prefetch={false}
                  className="row-link"
                >
                  {role.name}
                </Link>
                <span>
                  {pitchName(drawn.low, { prefer: number.keyFifths ?? 0 })}–
                  {pitchName(drawn.high, { prefer: number.keyFifths ?? 0 })}
                </span>
              </li>
            ))}
          </ul>
        )}
      </div>
      {view.mayChange && (
        <div className="flex flex-wrap gap-3 print:hidden">
          <EditNumberButton
            key={`${number.id} ${String(number.version)}`}
            productionId={productionId}
            number={number}
          />
          <MoveNumberButtons
            productionId={productionId}
            numberId={number.id}
            first={place === 0}
            last={place === view.numbers.length - 1}
          />
          <RemoveNumberButton
            key={`remove ${number.id}`}
            productionId={productionId}
            numberId={number.id}
            name={`${number.label}, ${number.title}`}
          />
        </div>
      )}
    </section>
  );
}
