"use client";

import Link from "next/link";
import { useMemo, useState } from "react";
import { DataTable, type DataColumn } from "@/components/tables/data-table";
import { Button } from "@/components/ui/button";
import { pitchName } from "@/lib/music/pitch-name";
import type { SignUpListed } from "@/lib/data/auditions/sign-ups";
import { clock, shortDay } from "@/lib/format-dates";
import { ChangeSignUp } from "./change-sign-up";
import { StateMark } from "./state-mark";

type Props = {
  productionId: string;
  rows: readonly SignUpListed[];
  mayChange: boolean;
  locale: string;
};

const LAST = Number.MAX_SAFE_INTEGER;
const brings = (row: SignUpListed): string =>
  [row.song, row.bars === null ? null : `${String(row.bars)} bars`]
    .filter((part) => part !== null)
    .join(", ");
const range = (row: SignUpListed): string =>
  row.range ? `${pitchName(row.range.low)}–${pitchName(row.range.high)}` : "";
const asks = (row: SignUpListed): string =>
  [
    row.asksFor,
    row.notBefore === null ? null : `not before ${row.notBefore}`,
    row.notAfter === null ? null : `not after ${row.notAfter}`,
  ]
    .filter((part) => part !== null)
    .join(", ");

/** Everyone signed up: to sort, filter and walk through by keyboard. */
export function SignUpsTable({ productionId, rows, mayChange, locale }: Props) {
  const [open, setOpen] = useState<string | null>(null);
  const columns = useMemo((): DataColumn<SignUpListed>[] => {
    const time = (row: SignUpListed): string =>
      row.slot
        ? `${shortDay(row.slot.localDate, locale)}, ${clock(new Date(row.slot.startsAt), row.slot.zone)}, ${row.slot.room}`
        : "no time yet";
    return [
      {
        id: "name",
        header: "Name",
        value: (row) =>
          `${row.name}${row.pronouns === null ? "" : ` ${row.pronouns}`}${row.minor ? " under 18" : ""}`,
        cell: (row) => (
          <>
            {row.name}
            {row.pronouns !== null && (
              <span className="font-normal text-ink-2"> {row.pronouns}</span>
            )}
            {row.minor && <span className="font-normal text-ochre"> · under 18</span>}
          </>
        ),
      },
      {
        id: "state",
        header: "State",
        value: (row) => row.state,
        cell: (row) => <StateMark state={row.state} />,
      },
      {
        id: "time",
        header: "Time",
        value: (row) => (row.slot ? new Date(row.slot.startsAt).getTime() : LAST),
        cell: (row) =>
          row.slot ? (
            <Link
              href={`/productions/${productionId}/auditions/${row.slot.dayId}`}
              className="text-link"
            >
              {time(row)}
            </Link>
          ) : (
            <span className="text-ink-2">no time yet</span>
          ),
      },
      { id: "brings", header: "Song, bars", value: brings },
      {
        id: "range",
        header: "Range",
        value: (row) => row.range?.low ?? LAST,
        cell: (row) =>
          row.range ? (
            `${range(row)} ${row.range.kind}`
          ) : (
            <span className="text-ink-2">not given</span>
          ),
      },
      { id: "asks", header: "Asks for", value: asks },
      ...(mayChange
        ? [
            {
              id: "change",
              header: "Change",
              sortable: false,
              value: (row: SignUpListed) => row.email ?? "",
              cell: (row: SignUpListed) => (
                <Button
                  size="small"
                  kind="quiet"
                  aria-label={`Change ${row.name}`}
                  onClick={() => setOpen(row.id)}
                >
                  Change
                </Button>
              ),
            },
          ]
        : []),
    ];
  }, [locale, mayChange, productionId]);
  const chosen = rows.find((row) => row.id === open);
  return (
    <>
      <DataTable
        caption="Singers"
        data={rows}
        columns={columns}
        rowId={(row) => row.id}
        filterLabel="Find a singer, song or state"
      />
      {chosen && (
        <ChangeSignUp
          key={chosen.id}
          productionId={productionId}
          row={chosen}
          onClose={() => setOpen(null)}
        />
      )}
    </>
  );
}
