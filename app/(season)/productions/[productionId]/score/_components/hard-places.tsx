import { pitchName } from "@/lib/music/pitch-name";
import { whereItLies } from "@/lib/score/where-it-lies";
import type { HardPlace } from "@/lib/score/where-it-lies";
import type { ScoreLine, ScoreNumber } from "@/lib/score/score-view";

const crotchets = (quarters: number): string => {
  const rounded = Math.round(quarters * 10) / 10;
  return `${String(rounded)} ${rounded === 1 ? "crotchet" : "crotchets"}`;
};

function measure(place: HardPlace): string {
  const parts = [place.pitch];
  if (place.quarters !== null) parts.push(crotchets(place.quarters));
  const optional = place.optional === null ? "" : `; optional ${pitchName(place.optional)}`;
  return parts.join(", ") + optional;
}

/** Where a role lies highest and lowest: number, first bar, note and for how long. */
export function HardPlaces({
  numbers,
  lines,
}: {
  numbers: readonly ScoreNumber[];
  lines: readonly ScoreLine[];
}) {
  const titles = new Map(numbers.map((number) => [number.id, number.title]));
  const { high, low } = whereItLies(
    lines.map((line) => ({ ...line, title: titles.get(line.numberId) ?? "" })),
  );
  const places = [...high, ...low];
  if (places.length === 0) return null;
  return (
    <section aria-labelledby="hard-title">
      <h3 id="hard-title" className="border-b border-rule pb-2 font-sans text-sm font-bold">
        Where it is hard
      </h3>
      <ul>
        {places.map((place, index) => (
          <li
            key={index}
            className="flex flex-wrap justify-between gap-x-4 border-b border-rule py-2 text-sm"
          >
            <span>
              <span className="sr-only">{place.end === "high" ? "Highest: " : "Lowest: "}</span>
              <cite>{place.title}</cite>
              {place.bar !== null && `, bar ${place.bar}`}
            </span>
            <span>{measure(place)}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
