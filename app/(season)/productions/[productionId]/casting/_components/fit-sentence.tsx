import { Fragment } from "react";
import { missingNotes, shareInWords } from "@/lib/client/casting";
import type { FitDetail } from "@/lib/data/casting/grid";

/** Titles of works in italics, with commas and an "and". */
function Titles({ titles }: { titles: readonly string[] }) {
  return titles.map((title, index) => (
    <Fragment key={title}>
      {index > 0 && (index === titles.length - 1 ? " and " : ", ")}
      <cite>{title}</cite>
    </Fragment>
  ));
}

const SITS = {
  within: "",
  low: " Most of it lies below what is comfortable.",
  high: " Most of it lies above what is comfortable.",
  wide: " It goes beyond what is comfortable at both ends.",
};

const room = (semitones: number) => `${String(semitones)} semitone${semitones === 1 ? "" : "s"}`;

/** The fit of a singer in a role as one would say it: what is missing, where, and for how long. */
export function FitSentence({ fit }: { fit: FitDetail }) {
  const { whole } = fit;
  const missing = missingNotes(fit);
  if (missing.length === 0) {
    return (
      <p>
        Every note is in range, with {room(whole.upperReserve)} to spare at the top and{" "}
        {room(whole.lowerReserve)} at the bottom.{SITS[whole.sits ?? "within"]}
      </p>
    );
  }
  return (
    <p>
      {missing.map(({ end, amount, notes, titles }, index) => (
        <Fragment key={end}>
          {index > 0 && " "}
          {amount} short at the {end} ({notes}) in{" "}
          {titles.length > 4 ? `${String(titles.length)} numbers` : <Titles titles={titles} />}.
        </Fragment>
      ))}
      {whole.shareOutside !== null &&
        ` ${capital(shareInWords(whole.shareOutside))} of the role’s sung time.`}
    </p>
  );
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);
