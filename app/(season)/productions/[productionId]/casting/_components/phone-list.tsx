import { Field } from "@/components/ui/field";
import { Select } from "@/components/ui/select";
import { sortByFit, type Grid, type GridSinger } from "@/lib/client/casting";
import { pitchName } from "@/lib/music/pitch-name";
import { ChoiceOfCell } from "./choice-of-cell";
import { FitOfCell } from "./fit-of-cell";
import type { Selected } from "./grid-table";
import { AnswerGiven, RangeOnFile } from "./range-on-file";

/** One role at a time on a narrow screen: its singers as rows, those who fit first. */
export function PhoneList({
  grid,
  singers,
  roleId,
  onRole,
  onSelect,
}: {
  grid: Grid;
  singers: readonly GridSinger[];
  roleId: string;
  onRole: (roleId: string) => void;
  onSelect: (cell: Selected) => void;
}) {
  const role = grid.roles.find((one) => one.id === roleId) ?? grid.roles[0];
  if (!role) return null;
  const line = role.line;
  return (
    <div className="flex flex-col gap-3">
      <Field
        label="Role"
        hint={
          line
            ? `Sings ${pitchName(line.low)}–${pitchName(line.high)}. Those who fit come first.`
            : "It has no vocal line yet."
        }
      >
        <Select value={role.id} onChange={(event) => onRole(event.currentTarget.value)}>
          {grid.roles.map((one) => (
            <option key={one.id} value={one.id}>
              {one.name}
            </option>
          ))}
        </Select>
      </Field>
      <ul className="border-y-2 border-ink bg-sheet">
        {sortByFit(singers, role).map((singer) => (
          <li key={singer.personId} className="border-b border-rule last:border-b-0">
            <button
              type="button"
              onClick={() => onSelect({ personId: singer.personId, roleId: role.id })}
              className="grid w-full grid-cols-[minmax(0,1fr)_9.5rem] items-center gap-3 px-3 py-2 text-left -outline-offset-2"
            >
              <span className="flex min-w-0 flex-col items-start gap-0.5">
                <span className="leading-snug font-bold">{singer.name}</span>
                <RangeOnFile range={singer.range} />
                {singer.minor && <span className="text-xs text-ink-2">a minor</span>}
                <AnswerGiven answer={singer.answer} />
                <ChoiceOfCell choice={singer.cells[role.id]?.choice ?? null} />
              </span>
              <FitOfCell singer={singer} role={role} />
            </button>
          </li>
        ))}
      </ul>
      {singers.length === 0 && <p className="text-ink-2">Nobody matches. Try fewer letters.</p>}
    </div>
  );
}
