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

/** Each clash in words, with what to do about it as buttons. */
export function ClashList({ clashes, onTake, more }: Props) {
  return (
    <ul>
      {clashes.map((clash) => (
        <li
          key={clash.id}
          className="flex flex-col gap-2 border-b border-rule py-3 text-sm first:border-t"
        >
          <p>
            <Chip tone="clash">{NAMES[clash.kind]}</Chip> {clash.words}.{" "}
            {clash.advice !== "" && <span className="text-ink-2">{clash.advice}</span>}
          </p>
          {(clash.remedies.length > 0 || more) && (
            <div className="flex flex-wrap gap-2">
              {clash.remedies.map((remedy) =>
                onTake ? (
                  <Button key={remedy.label} size="small" onClick={() => onTake(remedy, clash)}>
                    {remedy.label}
                  </Button>
                ) : (
                  <span key={remedy.label} className="text-ink-2">
                    {remedy.label}.
                  </span>
                ),
              )}
              {more?.(clash)}
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}
