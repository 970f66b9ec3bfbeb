import type { DraftSinger } from "@/lib/client/callbacks";
import { pitchName } from "@/lib/music/pitch-name";

/** Who it is: the range on file, what they sang and what they ask for. */
export function SingerHead({ singer }: { singer: DraftSinger }) {
  const { range } = singer;
  const notes = [
    singer.withdrawn && "withdrew from the auditions",
    singer.minor && "a minor",
    singer.asksFor !== null && `asks for ${singer.asksFor}`,
  ].filter((note) => note !== false);
  return (
    <>
      <span className="block leading-snug font-bold text-ink">{singer.name}</span>
      <span className="block text-sm text-ink-2">
        {range
          ? `${pitchName(range.low)}–${pitchName(range.high)} · ${range.kind}`
          : "no range on file"}
      </span>
      {notes.length > 0 && <span className="block text-xs text-ink-2">{notes.join(" · ")}</span>}
    </>
  );
}
