import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { choiceInWords, type Choice } from "@/lib/client/casting";
import type { RefusedWish } from "./use-choose";

const inWords = (choice: Pick<Choice, "state" | "kind"> | null) =>
  choice ? choiceInWords(choice) : "Not chosen";

/** Why a choice was not kept, and what to do: where someone else was quicker, both versions. */
export function RefusedNotice({
  refused,
  now,
  onRepeat,
  onReload,
  onDrop,
}: {
  refused: RefusedWish;
  /** What stands in the cell now. */
  now: Choice | null;
  onRepeat: () => void;
  onReload: () => void;
  onDrop: () => void;
}) {
  if (refused.code !== "stale") {
    return (
      <Notice
        tone="error"
        title={refused.message}
        actions={
          <Button size="small" onClick={onDrop}>
            Close
          </Button>
        }
      />
    );
  }
  return (
    <Notice
      tone="error"
      title="Someone else changed this while you were looking."
      actions={
        <>
          <Button size="small" onClick={onDrop}>
            Keep what is there
          </Button>
          <Button size="small" onClick={onRepeat}>
            Choose yours again
          </Button>
          <Button size="small" kind="quiet" onClick={onReload}>
            Load again
          </Button>
        </>
      }
    >
      <dl className="mt-1 grid grid-cols-[auto_1fr] gap-x-3">
        <dt>In the grid now</dt>
        <dd className="font-bold">{inWords(now)}</dd>
        <dt>You chose</dt>
        <dd className="font-bold">{inWords(refused.wish.after)}</dd>
      </dl>
    </Notice>
  );
}
