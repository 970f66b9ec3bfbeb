import Link from "next/link";
import { Chip } from "@/components/ui/chip";
import type { ScoreView } from "@/lib/score/score-view";
import { linesThatLookOff } from "./looks-off";
import { scoreHref } from "./selection";

/** Points at the lines that look an octave off, the first of them one press away. */
export function OctaveChip({ productionId, view }: { productionId: string; view: ScoreView }) {
  const off = linesThatLookOff(view.lines);
  const [first] = off;
  if (!view.mayChange || !first) return null;
  return (
    <Link
      href={scoreHref(productionId, { role: first.line.roleId }, "#side")}
      className="inline-flex min-h-6 items-center"
    >
      <Chip tone="stretch">
        {off.length === 1 ? "1 line looks" : `${String(off.length)} lines look`} an octave off
      </Chip>
    </Link>
  );
}
