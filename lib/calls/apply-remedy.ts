import type { Remedy } from "./types";

type HandChange = { personId: string; act: "call" | "excuse"; reason: string; keys: string[] };

/** The part of a call's form that a remedy can change. */
export type ChangeableCall<Block extends { key: string }> = {
  localDate: string;
  localTime: string;
  roomId: string;
  pianistId: string;
  blocks: Block[];
  hand: HandChange[];
};

/** The form with one remedy taken; everything else stays as it was typed. */
export function applyRemedy<Block extends { key: string }, Call extends ChangeableCall<Block>>(
  call: Call,
  remedy: Remedy,
): Call {
  switch (remedy.kind) {
    case "room":
      return { ...call, roomId: remedy.roomId };
    case "pianist":
      return { ...call, pianistId: remedy.personId };
    case "start":
      return { ...call, localDate: remedy.localDate, localTime: remedy.localTime };
    case "order": {
      const place = (block: Block): number => remedy.keys.indexOf(block.key);
      return { ...call, blocks: [...call.blocks].sort((a, b) => place(a) - place(b)) };
    }
    case "excuse": {
      const { personId, reason, keys } = remedy;
      // Someone called by hand is taken off again; someone the score needs is excused.
      const kept = call.hand.flatMap((change) => {
        if (change.personId !== personId || change.act !== "call") return [change];
        const theirs = change.keys.length > 0 ? change.keys : call.blocks.map((block) => block.key);
        const left = theirs.filter((key) => !keys.includes(key));
        return left.length > 0 ? [{ ...change, keys: left }] : [];
      });
      return { ...call, hand: [...kept, { personId, act: "excuse", reason, keys }] };
    }
  }
}
