import type { Route } from "next";
import Link from "next/link";
import { NoteShape, eventKindName, eventKinds } from "./note-shape";
import {
  BRACKET_WIDTH,
  GROUP_HEIGHT,
  HEAD_HEIGHT,
  LINE_GAP,
  ROW_HEIGHT,
  STAVE_HEIGHT,
  heightOnStave,
  placeInWeeks,
  placeStaves,
  weekWidth,
  type PlacedGroup,
} from "./season-layout";
import { SeasonTable } from "./season-table";
import type { SeasonClash, SeasonGroup, SeasonWeek } from "./season-types";

export type SeasonStavesProps = {
  weeks: readonly SeasonWeek[];
  groups: readonly SeasonGroup[];
  clashes: readonly SeasonClash[];
  /** "2027-03-11". */
  today: string;
  /** Names the drawing, for instance "Spring season". */
  label: string;
};

function Legend({ groups }: { groups: readonly SeasonGroup[] }) {
  const used = new Set(
    groups.flatMap((group) => group.productions.flatMap((p) => p.events.map((e) => e.kind))),
  );
  return (
    <ul className="mt-3 flex flex-wrap gap-x-6 gap-y-1 text-sm text-ink-2 md:pl-52">
      {eventKinds
        .filter((kind) => used.has(kind))
        .map((kind) => (
          <li key={kind} className="flex items-center gap-1.5">
            <svg width="18" height="16" aria-hidden="true" className="text-ink">
              <NoteShape kind={kind} x={9} y={8} />
            </svg>
            {eventKindName[kind]}
          </li>
        ))}
      <li>Top line 09:00, bottom line 22:00</li>
    </ul>
  );
}

function Labels({ groups }: { groups: readonly PlacedGroup[] }) {
  return (
    <div className="sticky left-0 z-10 w-32 shrink-0 bg-paper text-right md:w-52">
      <div style={{ height: HEAD_HEIGHT }} />
      {groups.map((group) => (
        <div key={group.label}>
          <p
            style={{ height: GROUP_HEIGHT }}
            className="flex items-end justify-end overflow-hidden pr-3 small-caps leading-tight max-md:text-xs max-md:tracking-normal"
          >
            {group.label}
          </p>
          {group.productions.map((production) => (
            <div
              key={production.id}
              style={{ height: ROW_HEIGHT }}
              className="flex flex-col justify-center overflow-hidden pr-3"
            >
              <h2 className="text-base leading-tight md:text-xl">
                {production.href === undefined ? (
                  production.title
                ) : (
                  <Link
                    href={production.href as Route}
                    className="inline-block py-0.5 no-underline hover:underline"
                  >
                    {production.title}
                  </Link>
                )}
              </h2>
              {production.sub !== undefined && (
                <p className="text-xs text-ink-2">{production.sub}</p>
              )}
            </div>
          ))}
        </div>
      ))}
    </div>
  );
}

function Bracket({ top, bottom }: { top: number; bottom: number }) {
  const x = BRACKET_WIDTH - 8;
  return (
    <>
      <rect x={x} y={top} width={3.5} height={bottom - top} fill="currentColor" />
      <path
        d={`M${String(x)} ${String(top)}q0-6 7-7M${String(x)} ${String(bottom)}q0 6 7 7`}
        fill="none"
        stroke="currentColor"
        strokeWidth={2}
      />
    </>
  );
}

/** A whole season: a stave per production, a bar per week, a note per call, clashes circled across. */
export function SeasonStaves({ weeks, groups, clashes, today, label }: SeasonStavesProps) {
  const { groups: placed, height } = placeStaves(groups);
  const bar = weekWidth(weeks.length);
  const left = BRACKET_WIDTH;
  const right = left + weeks.length * bar;
  const x = (place: number) => left + place * bar;
  const staves = placed.flatMap((group) => group.productions);
  const firstTop = staves[0]?.staveTop ?? HEAD_HEIGHT;
  const lastBottom = (staves.at(-1)?.staveTop ?? HEAD_HEIGHT) + STAVE_HEIGHT;
  const todayPlace = placeInWeeks(weeks, today, 720);

  return (
    <figure aria-label={label} className="m-0 min-w-0 print:[zoom:0.69] print:[page:wide]">
      <div
        role="region"
        aria-label={`${label}, drawn as staves; scrolls sideways`}
        tabIndex={0}
        className="overflow-x-auto print:overflow-visible"
      >
        <div className="flex w-max">
          <Labels groups={placed} />
          <svg width={right + 4} height={height} className="shrink-0 text-ink" role="img">
            <title>{`${label}: ${String(staves.length)} staves over ${String(weeks.length)} weeks. The table below says the same.`}</title>
            {weeks.map((week, index) => (
              <g key={week.start}>
                <rect
                  x={x(index) + 1}
                  y={6}
                  width={25}
                  height={23}
                  className="fill-sheet"
                  stroke="currentColor"
                />
                <text
                  x={x(index) + 13.5}
                  y={22}
                  textAnchor="middle"
                  className="fill-ink text-xs font-bold"
                >
                  {week.number}
                </text>
                <text x={x(index) + 33} y={22} className="fill-ink-2 text-xs">
                  {week.label}
                </text>
              </g>
            ))}
            {staves.flatMap((stave) =>
              [0, 1, 2, 3, 4].map((line) => (
                <line
                  key={`${stave.id} ${String(line)}`}
                  x1={left}
                  x2={right}
                  y1={stave.staveTop + line * LINE_GAP}
                  y2={stave.staveTop + line * LINE_GAP}
                  className="stroke-rule"
                />
              )),
            )}
            {placed.map((group) => {
              const top = group.productions[0]?.staveTop;
              const last = group.productions.at(-1)?.staveTop;
              if (top === undefined || last === undefined) return null;
              return (
                <g key={group.label}>
                  <Bracket top={top} bottom={last + STAVE_HEIGHT} />
                  {weeks.map((week, index) => (
                    <line
                      key={week.start}
                      x1={x(index)}
                      x2={x(index)}
                      y1={top}
                      y2={last + STAVE_HEIGHT}
                      stroke="currentColor"
                    />
                  ))}
                </g>
              );
            })}
            <line
              x1={right}
              x2={right}
              y1={firstTop}
              y2={lastBottom}
              stroke="currentColor"
              strokeWidth={3}
            />
            {todayPlace !== null && (
              <g className="text-smalt">
                <line
                  x1={x(todayPlace)}
                  x2={x(todayPlace)}
                  y1={HEAD_HEIGHT + 10}
                  y2={lastBottom + 8}
                  stroke="currentColor"
                  strokeWidth={1.75}
                  strokeDasharray="2 4"
                />
                <text
                  x={x(todayPlace)}
                  y={HEAD_HEIGHT + 5}
                  textAnchor="middle"
                  className="fill-smalt text-xs font-bold"
                >
                  today
                </text>
              </g>
            )}
            {staves.map((stave) => (
              <g key={stave.id} className={stave.tone === "smalt" ? "text-smalt" : "text-ink"}>
                {stave.events.map((event) => {
                  const place = placeInWeeks(weeks, event.localDate, event.minutesOfDay);
                  if (place === null) return null;
                  return (
                    <g key={event.id}>
                      <title>{event.label}</title>
                      <NoteShape
                        kind={event.kind}
                        x={x(place)}
                        y={stave.staveTop + heightOnStave(event.minutesOfDay)}
                      />
                    </g>
                  );
                })}
              </g>
            ))}
            {clashes.map((clash) => {
              const place = placeInWeeks(weeks, clash.localDate, clash.minutesOfDay);
              const tops = staves
                .filter((stave) => clash.productionIds.includes(stave.id))
                .map((stave) => stave.staveTop + heightOnStave(clash.minutesOfDay));
              if (place === null || tops.length === 0) return null;
              const top = Math.min(...tops) - 12;
              const bottom = Math.max(...tops) + 12;
              return (
                <g
                  key={`${clash.localDate} ${String(clash.minutesOfDay)} ${clash.label}`}
                  className="text-vermilion"
                >
                  <title>{clash.label}</title>
                  <rect
                    x={x(place) - 10}
                    y={top}
                    width={20}
                    height={bottom - top}
                    rx={10}
                    fill="none"
                    stroke="currentColor"
                    strokeWidth={2}
                  />
                  <path
                    d={`M${(x(place) - 6).toFixed(1)} ${String(top - 15)}l12 4.5-12 4.5`}
                    fill="none"
                    stroke="currentColor"
                    strokeWidth={2}
                  />
                </g>
              );
            })}
          </svg>
        </div>
      </div>
      <Legend groups={groups} />
      <SeasonTable groups={groups} clashes={clashes} label={label} />
    </figure>
  );
}
