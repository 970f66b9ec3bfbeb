import type { ReactNode } from "react";
import { EmptyState } from "@/components/ui/empty-state";

/** Before anything is known of the score. */
export function ScoreEmpty({ actions }: { actions: ReactNode }) {
  return (
    <EmptyState title="No numbers and no roles yet" action={actions}>
      {actions ? (
        <>
          Here stand the numbers of the show and what each role sings in them. Read a score exported
          from a notation program as MusicXML, one file a number, and ranges come from the notes
          themselves; or type numbers, roles and their lowest and highest notes in.
        </>
      ) : (
        <>The music director has not put the score in yet.</>
      )}
    </EmptyState>
  );
}
