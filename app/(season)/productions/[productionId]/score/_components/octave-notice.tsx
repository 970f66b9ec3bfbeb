"use client";

import { useState } from "react";
import { Notice } from "@/components/ui/notice";
import { PendingButton } from "@/components/ui/pending-button";
import type { OctaveLooks } from "@/lib/score/octave-looks";
import { shiftBy } from "./octave-buttons";
import type { PartShift } from "./octave-buttons";

type Props = PartShift & {
  looks: OctaveLooks;
  role: string;
  number: string;
  /** The note it would reach as it stands. */
  reaches: string;
  mayChange: boolean;
};

/** Says that a line looks an octave off, why, and puts it right in one press. */
export function OctaveNotice({ looks, role, number, reaches, mayChange, ...part }: Props) {
  const [pending, setPending] = useState(false);
  const high = looks.shift < 0;
  return (
    <Notice
      tone="caution"
      title={`${role} looks an octave ${high ? "high" : "low"} in ${number}.`}
      {...(mayChange && {
        actions: (
          <PendingButton
            size="small"
            pending={pending}
            onClick={() => {
              setPending(true);
              void shiftBy(part, looks.shift).then(() => {
                setPending(false);
              });
            }}
          >
            Put it an octave {high ? "down" : "up"}
          </PendingButton>
        ),
      })}
    >
      As it stands it lies mostly outside {looks.voice}’s range and reaches {reaches}. A clef
      without its 8 does that. Compare it with the printed score.
    </Notice>
  );
}
