import { Chip } from "@/components/ui/chip";
import type { DraftSinger } from "@/lib/client/callbacks";

const ANSWERS = {
  yes: { tone: "fits", words: "Will come" },
  no: { tone: "clash", words: "Can’t come" },
  open: { tone: "plain", words: "No answer yet" },
} as const;

const UNSENT = {
  new: "not sent yet",
  changed: "not sent yet",
  off: "to be taken off",
  none: null,
};

/** What one person answered, and what of theirs has not gone out. */
export function AnswerCell({ singer, published }: { singer: DraftSinger; published: boolean }) {
  const answer = singer.sent && ANSWERS[singer.sent.answer ?? "open"];
  const unsent = published ? UNSENT[singer.unsent] : null;
  return (
    <span className="flex flex-wrap items-center gap-1.5">
      {answer && <Chip tone={answer.tone}>{answer.words}</Chip>}
      {unsent !== null && <Chip tone="stretch">{unsent}</Chip>}
    </span>
  );
}
