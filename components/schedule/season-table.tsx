import { clock } from "@/components/ui/format-duration";
import { Cell, ColumnHead, RowHead, Table } from "@/components/ui/table";
import { eventKindName } from "./note-shape";
import type { SeasonClash, SeasonGroup } from "./season-types";

const dayFormat = new Intl.DateTimeFormat("en-GB", {
  weekday: "short",
  day: "numeric",
  month: "short",
  timeZone: "UTC",
});

const writeDay = (localDate: string) => dayFormat.format(new Date(`${localDate}T00:00:00Z`));

/** The season again as a table, for those who read rather than see it; folded until wanted. */
export function SeasonTable({
  groups,
  clashes,
  label,
}: {
  groups: readonly SeasonGroup[];
  clashes: readonly SeasonClash[];
  label: string;
}) {
  const rows = [
    ...groups.flatMap((group) =>
      group.productions.flatMap((production) =>
        production.events.map((event) => ({
          key: event.id,
          date: event.localDate,
          minutes: event.minutesOfDay,
          where: `${production.title}, ${group.label}`,
          what: `${eventKindName[event.kind]}: ${event.label}`,
        })),
      ),
    ),
    ...clashes.map((clash, index) => ({
      key: `clash ${String(index)}`,
      date: clash.localDate,
      minutes: clash.minutesOfDay,
      where: groups
        .flatMap((group) => group.productions)
        .filter((production) => clash.productionIds.includes(production.id))
        .map((production) => production.title)
        .join(" and "),
      what: `Clash: ${clash.label}`,
    })),
  ].toSorted((a, b) => a.date.localeCompare(b.date) || a.minutes - b.minutes);
  return (
    <details className="mt-3 md:pl-52 print:hidden">
      <summary className="inline-flex min-h-11 items-center text-sm font-bold text-smalt md:min-h-8">
        The same as a table
      </summary>
      <Table caption={`${label}, day by day`} className="mt-1">
        <thead>
          <tr>
            <ColumnHead>Day</ColumnHead>
            <ColumnHead>Time</ColumnHead>
            <ColumnHead>Production</ColumnHead>
            <ColumnHead>What</ColumnHead>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={row.key}>
              <RowHead className="whitespace-nowrap">{writeDay(row.date)}</RowHead>
              <Cell>{clock(row.minutes)}</Cell>
              <Cell>{row.where}</Cell>
              <Cell>{row.what}</Cell>
            </tr>
          ))}
        </tbody>
      </Table>
    </details>
  );
}
