import type { ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Chip } from "@/components/ui/chip";
import type { ClashInWords, Remedy } from "@/lib/calls/types";

const NAMES: Record<ClashInWords["kind"], string> = {
  conflict: "Conflict",
  person: "Clash",
  room: "Room",
  pianist: "Pianist",
  travel: "Way",
};

type Props = {
  clashes: readonly ClashInWords[];
  /** Takes what the button says; without it the remedies are only read. */
  onTake?: ((remedy: Remedy, clash: ClashInWords) => void) | undefined;
  /** More that can be done about one, such as agreeing to a conflict. */
  more?: (clash: ClashInWords) => ReactNode;
};

/** Above so many clashes the start that solves them all is offered once, under them, and not in each. */
const EACH_ITS_OWN = 2;

/** Each clash in words, with what to do about it as buttons. */
export function ClashList({ clashes, onTake, more }: Props) {
  const hoisted = clashes.length > EACH_ITS_OWN ? startOf(clashes) : null;
  const [first] = clashes;
  return (
    <>
      <ul>
        {clashes.map((clash) => {
          const own = clash.remedies.filter(({ kind }) => kind !== "start");
          const shown = hoisted && own.length > 0 ? own : clash.remedies;
          return (
            <li
              key={clash.id}
              className="flex flex-col gap-2 border-b border-rule py-3 text-sm first:border-t"
            >
              <p>
                <Chip tone="clash">{NAMES[clash.kind]}</Chip> {clash.words}.{" "}
                {clash.advice !== "" && <span className="text-ink-2">{clash.advice}</span>}
              </p>
              {(shown.length > 0 || more) && (
                <div className="flex flex-wrap gap-2">
                  {shown.map((remedy) => (
                    <TakeRemedy
                      key={remedy.label}
                      remedy={remedy}
                      onTake={onTake && (() => onTake(remedy, clash))}
                    />
                  ))}
                  {more?.(clash)}
                </div>
              )}
            </li>
          );
        })}
      </ul>
      {hoisted && first && (
        <div className="mt-3 flex flex-wrap items-center gap-2 text-sm">
          <span>For all of them:</span>
          <TakeRemedy remedy={hoisted} onTake={onTake && (() => onTake(hoisted, first))} />
        </div>
      )}
    </>
  );
}

function startOf(clashes: readonly ClashInWords[]): Remedy | null {
  return (
    clashes.flatMap((clash) => clash.remedies).find((remedy) => remedy.kind === "start") ?? null
  );
}

function TakeRemedy({ remedy, onTake }: { remedy: Remedy; onTake: (() => void) | undefined }) {
  if (!onTake) return <span className="text-ink-2">{remedy.label}.</span>;
  return (
    <Button size="small" onClick={onTake}>
      {remedy.label}
    </Button>
  );
}
