import { Chip, type ChipTone } from "@/components/ui/chip";
import { Cell, ColumnHead, RowHead, Table } from "@/components/ui/table";
import type { ImportRow } from "@/lib/auditions/import-preview";
import { pitchName } from "@/lib/music/pitch-name";

const verdicts: Record<ImportRow["becomes"], { tone: ChipTone; words: string }> = {
  "new person": { tone: "fits", words: "new person" },
  "known person": { tone: "info", words: "known to the company" },
  "signed up": { tone: "plain", words: "on the list already" },
  problem: { tone: "clash", words: "left out" },
};

const note = (value: ImportRow["values"]["low"]): string =>
  typeof value === "number" ? pitchName(value) : "";

function details({ values }: ImportRow): string {
  const range = [note(values.low), note(values.high)].filter(Boolean).join("–");
  return [
    values.song,
    typeof values.bars === "number" ? `${String(values.bars)} bars` : null,
    range,
    values.asksFor,
    values.notBefore ? `not before ${values.notBefore}` : null,
    values.notAfter ? `not after ${values.notAfter}` : null,
    values.minor ? "under 18" : null,
  ]
    .filter(Boolean)
    .join(", ");
}

/** The sheet row by row: those with problems first, then in its own order. */
export function ImportTable({ rows }: { rows: readonly ImportRow[] }) {
  const inOrder = [
    ...rows.filter((row) => row.becomes === "problem"),
    ...rows.filter((row) => row.becomes !== "problem"),
  ];
  return (
    <Table caption="What each row becomes">
      <thead>
        <tr>
          <ColumnHead>Row</ColumnHead>
          <ColumnHead>Name</ColumnHead>
          <ColumnHead>Becomes</ColumnHead>
          <ColumnHead>E-mail</ColumnHead>
          <ColumnHead>Brings and asks for</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {inOrder.map((row) => (
          <tr key={row.line}>
            <Cell>{row.line}</Cell>
            <RowHead>
              {row.values.name || <span className="font-normal text-ink-2">no name</span>}
            </RowHead>
            <Cell>
              <Chip tone={verdicts[row.becomes].tone}>{verdicts[row.becomes].words}</Chip>
              {row.knownAs !== null && (
                <p className="mt-1 text-sm text-ink-2">known as {row.knownAs}, which stays</p>
              )}
              {row.problems.map((problem) => (
                <p key={problem} className="mt-1 min-w-56 text-sm text-vermilion">
                  {problem}
                </p>
              ))}
            </Cell>
            <Cell className="break-all">{row.values.email}</Cell>
            <Cell>{details(row)}</Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
