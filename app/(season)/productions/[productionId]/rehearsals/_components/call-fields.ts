import type { BlockKind, CallKind } from "@/lib/calls/call-kinds";
import type { CallDraft } from "@/lib/schemas/calls";

export type BlockFields = {
  key: string;
  kind: BlockKind;
  minutes: string;
  numberId: string;
  title: string;
  bars: string;
  detail: string;
};

export type HandFields = {
  personId: string;
  act: "call" | "excuse";
  reason: string;
  keys: string[];
};

/** What the form of a call holds: text as typed. */
export type CallFields = {
  productionId: string;
  kind: CallKind;
  title: string;
  localDate: string;
  localTime: string;
  roomId: string;
  leaderId: string;
  pianistId: string;
  blocks: BlockFields[];
  hand: HandFields[];
};

/** A saved call as its form shows it. */
export function fieldsOf(draft: CallDraft): CallFields {
  return {
    productionId: draft.productionId,
    kind: draft.kind,
    title: draft.title ?? "",
    localDate: draft.localDate,
    localTime: draft.localTime,
    roomId: draft.roomId ?? "",
    leaderId: draft.leaderId ?? "",
    pianistId: draft.pianistId ?? "",
    blocks: draft.blocks.map((block) => ({
      key: block.key,
      kind: block.kind,
      minutes: String(block.minutes),
      numberId: block.numberId ?? "",
      title: block.title ?? "",
      bars: block.bars ?? "",
      detail: block.detail ?? "",
    })),
    hand: draft.hand,
  };
}

/** Minutes a new block begins with; the music director writes their own. */
const USUAL_MINUTES: Record<BlockKind, string> = {
  number: "30",
  scene: "30",
  warm_up: "10",
  break: "15",
};

/** An empty block with a key no other block of the call has. */
export function newBlock(
  blocks: readonly BlockFields[],
  kind: BlockKind,
  numberId = "",
): BlockFields {
  let n = blocks.length + 1;
  while (blocks.some((block) => block.key === `new-${String(n)}`)) n += 1;
  return {
    key: `new-${String(n)}`,
    kind,
    minutes: USUAL_MINUTES[kind],
    numberId,
    title: "",
    bars: "",
    detail: "",
  };
}
