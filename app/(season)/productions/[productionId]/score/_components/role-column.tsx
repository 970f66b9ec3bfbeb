import Link from "next/link";
import { RehearsalMark } from "@/components/layout/rehearsal-mark";
import { HistogramKeyboard } from "@/components/music/histogram-keyboard";
import { PitchKeyboard } from "@/components/music/pitch-keyboard";
import { groupBy } from "@/lib/group-by";
import { mergeLines } from "@/lib/music/merge-lines";
import { pitchName } from "@/lib/music/pitch-name";
import { tessitura } from "@/lib/music/tessitura";
import type { PitchSpan } from "@/lib/music/types";
import { ROLE_KIND_NAMES } from "@/lib/score/review-types";
import { drawnLine } from "@/lib/score/score-view";
import type { ScoreLine, ScoreNumber, ScoreRole, ScoreView } from "@/lib/score/score-view";
import { HardPlaces } from "./hard-places";
import { linesThatLookOff } from "./looks-off";
import { OctaveNotice } from "./octave-notice";
import { EditRoleButton } from "./score-buttons";
import { RemoveRoleButton } from "./remove-buttons";
import { scoreHref } from "./selection";
import { sungTime } from "./sung-time";
import { TypeLineChooser } from "./type-line-chooser";

type Props = { productionId: string; view: ScoreView; role: ScoreRole };

/** What one role sings: its range, how long on each note, number by number, and where it is hard. */
export function RoleColumn({ productionId, view, role }: Props) {
  const lines = view.lines.filter((line) => line.roleId === role.id);
  const numbers = view.numbers.map((number) => ({
    number,
    lines: lines.filter((line) => line.numberId === number.id),
  }));
  const singing = numbers.filter((each) => each.lines.length > 0);
  return (
    <section aria-labelledby="role-title" className="flex flex-col gap-5">
      <div>
        <h2 id="role-title" className="text-2xl">
          What {role.name} sings
        </h2>
        <p className="mt-1 text-sm text-ink-2">{inWords(lines)}</p>
      </div>
      {linesThatLookOff(lines).map(({ line, looks }) => (
        <OctaveNotice
          key={line.id}
          productionId={productionId}
          scorePartId={line.scorePartId ?? ""}
          octaveShift={line.octaveShift ?? 0}
          looks={looks}
          role={role.name}
          number={view.numbers.find((number) => number.id === line.numberId)?.title ?? ""}
          reaches={looks.shift < 0 ? line.highSpelled : line.lowSpelled}
          mayChange={view.mayChange}
        />
      ))}
      <Drawing role={role} lines={lines} />
      {singing.length > 0 && (
        <div className="min-w-0 overflow-x-auto">
          <table className="w-full border-collapse text-sm">
            <caption className="pb-1 text-left font-bold">Number by number</caption>
            <thead className="text-left text-ink-2">
              <tr>
                <th scope="col" className="border-b border-rule py-1.5 pr-2 font-normal">
                  Number
                </th>
                <th scope="col" className="border-b border-rule py-1.5 pr-2 font-normal">
                  Range
                </th>
                <th scope="col" className="border-b border-rule py-1.5 pr-2 font-normal">
                  Mostly
                </th>
                <th scope="col" className="border-b border-rule py-1.5 text-right font-normal">
                  Sings
                </th>
              </tr>
            </thead>
            <tbody>
              {singing.map(({ number, lines: own }) => {
                const drawn = drawnLine(own);
                return (
                  <tr key={number.id}>
                    <th scope="row" className="border-b border-rule py-1.5 pr-2 text-left">
                      <Link
                        href={scoreHref(productionId, { role: role.id, number: number.id })}
                        scroll={false}
                        prefetch={false}
                        className="inline-flex min-h-6 items-center gap-2 font-normal text-ink hover:underline"
                      >
                        <RehearsalMark>{number.label}</RehearsalMark>
                        <cite>{number.title}</cite>
                      </Link>
                    </th>
                    <td className="border-b border-rule py-1.5 pr-2 whitespace-nowrap">
                      {drawn && span(drawn, number)}
                    </td>
                    <td className="border-b border-rule py-1.5 pr-2 whitespace-nowrap text-ink-2">
                      {drawn?.tessitura ? span(drawn.tessitura, number) : "not known"}
                    </td>
                    <td className="border-b border-rule py-1.5 text-right whitespace-nowrap text-ink-2">
                      {sungTime(own, number)}
                    </td>
                  </tr>
                );
              })}
            </tbody>
          </table>
        </div>
      )}
      <HardPlaces numbers={view.numbers} lines={lines} />
      <p className="text-sm text-ink-2">
        {ROLE_KIND_NAMES[role.kind]},{" "}
        {role.needed === 1 ? "1 person" : `${String(role.needed)} people`}
        {role.covers > 0 && `, ${String(role.covers)} ${role.covers === 1 ? "cover" : "covers"}`}.
        {role.about && ` ${role.about}`}
      </p>
      {view.mayChange && (
        <div className="flex flex-col gap-4 print:hidden">
          <TypeLineChooser
            key={role.id}
            productionId={productionId}
            role={role}
            numbers={numbers
              .filter((each) => each.lines.length === 0)
              .map(({ number }) => ({ id: number.id, name: `${number.label} ${number.title}` }))}
          />
          <div className="flex flex-wrap gap-3">
            <EditRoleButton
              key={`edit ${role.id} ${String(role.version)}`}
              productionId={productionId}
              role={role}
            />
            <RemoveRoleButton
              key={`remove ${role.id}`}
              productionId={productionId}
              roleId={role.id}
              name={role.name}
            />
          </div>
        </div>
      )}
    </section>
  );
}

/** "B♭3–E5", spelled as in the number's key. */
function span({ low, high }: PitchSpan, number: ScoreNumber): string {
  const prefer = number.keyFifths ?? 0;
  return `${pitchName(low, { prefer })}–${pitchName(high, { prefer })}`;
}

function inWords(lines: readonly ScoreLine[]): string {
  const whole = drawnLine(lines);
  if (!whole) return "No line yet: read a score, or type the lowest and highest notes in.";
  const range = `${pitchName(whole.low)} to ${pitchName(whole.high)}.`;
  const middle = whole.tessitura;
  if (!middle)
    return `${range} How long on which note is known only in part, where lines were typed in.`;
  return `${range} Half of the sung time lies between ${pitchName(middle.low)} and ${pitchName(middle.high)}.`;
}

function Drawing({ role, lines }: { role: ScoreRole; lines: readonly ScoreLine[] }) {
  const whole = drawnLine(lines);
  if (!whole) return null;
  const known = lines.filter((line) => line.histogram !== null);
  const merged = mergeLines(
    known.map((line) => ({
      low: line.low,
      high: line.high,
      histogram: line.histogram ?? undefined,
    })),
  );
  const label = `What ${role.name} sings`;
  if (!merged?.histogram)
    return <PitchKeyboard range={whole} label={label} from={whole.low - 5} to={whole.high + 5} />;
  const without = groupBy(
    lines.filter((line) => line.histogram === null),
    (line) => line.numberId,
  ).size;
  return (
    <figure>
      <HistogramKeyboard
        histogram={merged.histogram}
        low={whole.low}
        high={whole.high}
        tessitura={tessitura(merged.histogram)}
        label={label}
      />
      {without > 0 && (
        <figcaption className="mt-1 text-sm text-ink-2">
          Without{" "}
          {without === 1
            ? "the number whose line was"
            : `the ${String(without)} numbers whose lines were`}{" "}
          typed in.
        </figcaption>
      )}
    </figure>
  );
}
