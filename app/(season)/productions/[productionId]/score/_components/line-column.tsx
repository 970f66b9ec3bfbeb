import { pitchName } from "@/lib/music/pitch-name";
import type { ScoreNumber, ScoreRole, ScoreView } from "@/lib/score/score-view";
import { LineForm } from "./line-form";
import { OctaveButtons } from "./octave-buttons";
import { RemoveLineButton } from "./remove-line-button";

type Props = { productionId: string; view: ScoreView; role: ScoreRole; number: ScoreNumber };

/** One role in one number: the line as it stands, and how to put it right. */
export function LineColumn({ productionId, view, role, number }: Props) {
  const lines = view.lines.filter((line) => line.roleId === role.id && line.numberId === number.id);
  if (lines.length === 0 && !view.mayChange) return null;
  const typed = lines.find((line) => line.source === "typed");
  const read = lines.filter((line) => line.source === "read");
  return (
    <section
      aria-labelledby="line-title"
      className="flex flex-col gap-4 border-y-2 border-ink py-4"
    >
      <h2 id="line-title" className="text-2xl">
        {role.name} in <em>{number.title}</em>
      </h2>
      <ul className="flex flex-col gap-3">
        {lines.map((line) => (
          <li key={line.id} className="flex flex-col gap-2 text-sm">
            <span>
              <strong>
                {line.lowSpelled} to {line.highSpelled}
              </strong>
              {line.source === "read"
                ? `, read from the part ${line.partName ?? ""}`
                : ", typed in"}
              {(line.octaveShift ?? 0) !== 0 && `, ${octaves(line.octaveShift ?? 0)}`}.
              {line.optionalHigh !== null && ` Optional up to ${pitchName(line.optionalHigh)}.`}
              {line.optionalLow !== null && ` Optional down to ${pitchName(line.optionalLow)}.`}
            </span>
            {view.mayChange && (
              <span className="flex flex-wrap gap-2">
                {line.scorePartId !== null && (
                  <OctaveButtons
                    productionId={productionId}
                    scorePartId={line.scorePartId}
                    octaveShift={line.octaveShift ?? 0}
                  />
                )}
                <RemoveLineButton
                  productionId={productionId}
                  lineId={line.id}
                  role={role.name}
                  number={number.title}
                />
              </span>
            )}
          </li>
        ))}
      </ul>
      {view.mayChange && (
        <LineForm
          key={`${role.id} ${number.id} ${lines.map((line) => line.lowSpelled + line.highSpelled).join()}`}
          productionId={productionId}
          roleId={role.id}
          numberId={number.id}
          fifths={number.keyFifths ?? 0}
          low={typed?.lowSpelled ?? ""}
          high={typed?.highSpelled ?? ""}
          replaces={read.length}
        />
      )}
    </section>
  );
}

function octaves(shift: number): string {
  const by = Math.abs(shift);
  return `${by === 1 ? "an octave" : `${String(by)} octaves`} ${shift > 0 ? "above" : "below"} where it is written`;
}
