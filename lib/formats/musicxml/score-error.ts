export type ScoreErrorCode =
  | "score.empty"
  | "score.too-large"
  | "score.not-musicxml"
  | "score.collection"
  | "score.malformed"
  | "score.entities"
  | "score.encoding"
  | "score.too-deep"
  | "score.archive"
  | "score.archive-password"
  | "score.no-music"
  | "score.duplicate-part"
  | "score.bad-pitch"
  | "score.bad-duration"
  | "score.took-too-long";

/** Which kind of refusal each is: what a route answers and a form shows follows from it. */
const KIND: Record<ScoreErrorCode, "wrong-kind" | "too-large" | "refused"> = {
  "score.empty": "refused",
  "score.too-large": "too-large",
  "score.not-musicxml": "wrong-kind",
  "score.collection": "refused",
  "score.malformed": "refused",
  "score.entities": "refused",
  "score.encoding": "refused",
  "score.too-deep": "refused",
  "score.archive": "refused",
  "score.archive-password": "refused",
  "score.no-music": "refused",
  "score.duplicate-part": "refused",
  "score.bad-pitch": "refused",
  "score.bad-duration": "refused",
  "score.took-too-long": "refused",
};

/** A score that cannot be read. The message is for the person: what is wrong and what to do. */
export class ScoreError extends Error {
  readonly code: ScoreErrorCode;

  constructor(code: ScoreErrorCode, message: string) {
    super(message);
    this.name = "ScoreError";
    this.code = code;
  }

  get kind(): "wrong-kind" | "too-large" | "refused" {
    return KIND[this.code];
  }
}
