"use client";

import Link from "next/link";
import { useQueryClient } from "@tanstack/react-query";
import { VoiceCaution } from "@/components/casting/voice-caution";
import { castingQuery, type Grid, type GridRole, type GridSinger } from "@/lib/client/casting";
import { ChooseButtons } from "./choose-buttons";
import { ChoiceOfCell } from "./choice-of-cell";
import { FitDetails } from "./fit-details";
import { RefusedNotice } from "./refused-notice";
import type { useChoose } from "./use-choose";

/** What is missing before there is anything to compute, and where to get it. */
function NothingToCompute({ productionId, role }: { productionId: string; role: GridRole }) {
  const missing = role.line
    ? {
        words: "There is no range on file for this singer.",
        href: `/productions/${productionId}/callbacks` as const,
        label: "Write the range heard, at the callbacks",
      }
    : {
        words: `${role.name} has no vocal line yet.`,
        href: `/productions/${productionId}/score` as const,
        label: "Read a score or type the line in",
      };
  return (
    <p className="text-sm">
      {missing.words}{" "}
      <Link className="text-link" href={missing.href}>
        {missing.label}
      </Link>
      .
    </p>
  );
}

/** One cell opened: the fit in words, number by number, and the choice. */
export function CellPanel({
  productionId,
  grid,
  singer,
  role,
  choosing,
}: {
  productionId: string;
  grid: Grid;
  singer: GridSinger;
  role: GridRole;
  choosing: ReturnType<typeof useChoose>;
}) {
  const client = useQueryClient();
  const cell = singer.cells[role.id];
  const choice = cell?.choice ?? null;
  const title = `${singer.name} as ${role.name}`;
  const here = { personId: singer.personId, roleId: role.id, title };
  const { refused } = choosing;
  const mine =
    refused?.wish.personId === here.personId && refused.wish.roleId === here.roleId
      ? refused
      : null;
  return (
    <div className="flex flex-col gap-4">
      {cell?.verdict ? (
        <FitDetails
          key={`${here.personId} ${here.roleId}`}
          productionId={productionId}
          singer={singer}
          role={role}
          zone={grid.zone}
          locale={grid.locale}
        />
      ) : (
        <NothingToCompute productionId={productionId} role={role} />
      )}
      {singer.answer === "no" && (
        <p className="text-sm">Answered that they can’t come to the callback.</p>
      )}
      <div aria-live="assertive">
        {mine && (
          <RefusedNotice
            refused={mine}
            now={choice}
            onDrop={choosing.dropRefused}
            onRepeat={() => choosing.choose({ ...mine.wish, before: choice })}
            onReload={() => {
              choosing.dropRefused();
              void client.invalidateQueries({ queryKey: castingQuery(productionId).queryKey });
            }}
          />
        )}
      </div>
      {grid.mayChoose ? (
        <ChooseButtons
          role={role}
          choice={choice}
          title={title}
          onChoose={(after) => choosing.choose({ ...here, before: choice, after })}
        />
      ) : (
        <p className="flex items-center gap-2 text-sm">
          {choice ? <ChoiceOfCell choice={choice} /> : "Not chosen."}
        </p>
      )}
      {singer.minor && <VoiceCaution minor />}
    </div>
  );
}
