"use client";

import { useQuery } from "@tanstack/react-query";
import dynamic from "next/dynamic";
import { useRef, useState } from "react";
import { VoiceCaution } from "@/components/casting/voice-caution";
import { PageTitle } from "@/components/layout/page-title";
import { SideColumn } from "@/components/layout/side-column";
import { Chip } from "@/components/ui/chip";
import { Field } from "@/components/ui/field";
import { Input } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { castingQuery, openRoles, singerText, sortByFit } from "@/lib/client/casting";
import { LOOK_AGAIN } from "@/lib/client/look-again";
import { matches } from "@/lib/client/matches";
import { CellPanel } from "./cell-panel";
import { CoversList } from "./covers-list";
import { GridTable, type Selected } from "./grid-table";
import { PhoneList } from "./phone-list";
import { PublishCast } from "./publish-cast";
import { useChoose } from "./use-choose";
import { useWide } from "./use-wide";

// Only narrow screens open a cell over the page.
const Dialog = dynamic(() => import("@/components/ui/dialog").then((module) => module.Dialog));

/** The casting grid, kept up to date while two or more people look at it. */
export function CastingBoard({ productionId }: { productionId: string }) {
  const choosing = useChoose(productionId);
  const { data: grid, error } = useQuery({
    ...castingQuery(productionId),
    // An answer that left before the choice arrived would take it off the screen again.
    refetchInterval: choosing.busy ? false : LOOK_AGAIN,
  });
  const [selected, setSelected] = useState<Selected | null>(null);
  const [sortedBy, setSortedBy] = useState<string | null>(null);
  const [typed, setTyped] = useState("");
  const [phoneRole, setPhoneRole] = useState("");
  const panel = useRef<HTMLHeadingElement>(null);
  const opener = useRef<HTMLElement | null>(null);
  const wide = useWide();
  if (!grid) return null;

  const sortRole = grid.roles.find((role) => role.id === sortedBy);
  const found = grid.singers.filter((one) => matches(singerText(one, grid.roles), typed));
  const singers = sortRole ? sortByFit(found, sortRole) : found;
  const singer = grid.singers.find((one) => one.personId === selected?.personId);
  const role = grid.roles.find((one) => one.id === selected?.roleId);
  const open = openRoles(grid);

  function select(cell: Selected, enter: boolean) {
    opener.current = document.activeElement instanceof HTMLElement ? document.activeElement : null;
    setSelected(cell);
    // After the panel is there.
    if (enter) requestAnimationFrame(() => panel.current?.focus());
  }

  const title = singer && role && (
    <>
      {singer.name} <span className="text-[0.7em] text-ink-2">as</span> {role.name}
    </>
  );
  const opened = singer && role && (
    <CellPanel
      productionId={productionId}
      grid={grid}
      singer={singer}
      role={role}
      choosing={choosing}
    />
  );

  return (
    <>
      <PageTitle
        title="Casting grid"
        sub="Ranges of each role come from the vocal book. The solid part of a bar is where most of the singing lies."
        chips={
          <>
            <Chip tone={open.length === 0 ? "fits" : "plain"}>
              {grid.roles.length - open.length} of {grid.roles.length} roles cast
            </Chip>
            <Chip tone={grid.castPublished ? "info" : "plain"}>
              {grid.castPublished ? "Cast list is out" : "Cast list not out yet"}
            </Chip>
          </>
        }
        {...(grid.mayChoose && {
          actions: <PublishCast productionId={productionId} grid={grid} />,
        })}
      />
      {error && (
        <Notice tone="caution" live className="mb-4" title="The grid may be old.">
          {error.message}
        </Notice>
      )}
      <SideColumn
        sideLabel="The cell that is open, and covers"
        side={
          <div className="flex flex-col gap-8 lg:sticky lg:top-4 lg:max-h-[calc(100dvh-2rem)] lg:overflow-y-auto lg:pb-4">
            <section
              className="max-lg:hidden"
              onKeyDown={(event) => {
                if (event.key === "Escape") opener.current?.focus();
              }}
            >
              {opened && wide ? (
                <>
                  <h2 ref={panel} tabIndex={-1} className="mb-2 text-2xl">
                    {title}
                  </h2>
                  {opened}
                </>
              ) : (
                <>
                  <h2 className="mb-2 text-2xl">No cell is open</h2>
                  <p className="text-sm text-ink-2">
                    Choose a cell to see which numbers are the trouble and by how much
                    {grid.mayChoose ? ", and to cast." : "."}
                  </p>
                </>
              )}
            </section>
            <CoversList grid={grid} />
            <VoiceCaution />
          </div>
        }
      >
        <div className="mb-3 flex flex-wrap items-end gap-x-4 gap-y-2 print:hidden">
          <Field label="Find a singer or a choice" className="w-full max-w-xs max-md:max-w-none">
            <Input
              type="search"
              value={typed}
              onChange={(event) => setTyped(event.currentTarget.value)}
            />
          </Field>
          <p role="status" className="pb-2 text-sm text-ink-2">
            {typed.trim() === ""
              ? `${String(grid.singers.length)} singers`
              : `${String(found.length)} of ${String(grid.singers.length)}`}
            {sortRole && `, by fit for ${sortRole.name}`}
          </p>
        </div>
        <div className="max-md:hidden">
          <GridTable
            grid={grid}
            singers={singers}
            selected={selected}
            onSelect={select}
            sortedBy={sortedBy}
            onSort={setSortedBy}
          />
        </div>
        <div className="md:hidden print:hidden">
          <PhoneList
            grid={grid}
            singers={found}
            roleId={phoneRole}
            onRole={setPhoneRole}
            onSelect={(cell) => select(cell, false)}
          />
        </div>
      </SideColumn>
      {!wide && title && opened && (
        <Dialog
          open
          title={title}
          onOpenChange={() => {
            setSelected(null);
          }}
        >
          {opened}
        </Dialog>
      )}
    </>
  );
}
