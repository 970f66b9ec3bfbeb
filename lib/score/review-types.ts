import type { PitchSpan } from "@/lib/music/types";
import type { OctaveLooks } from "./octave-looks";

export const ROLE_KIND_NAMES = {
  principal: "Principal",
  supporting: "Supporting",
  ensemble: "Ensemble",
} as const;
export type RoleKind = keyof typeof ROLE_KIND_NAMES;

/** A part of a score that was read and is not placed yet. */
export type ReviewPart = {
  scorePartId: string;
  partKey: string;
  name: string;
  /** Has words under its notes, or a voice's name. */
  vocal: boolean;
  /** Null where the part has no sung pitch: it cannot become a line. */
  line:
    (PitchSpan & { lowSpelled: string; highSpelled: string; tessitura: PitchSpan | null }) | null;
  /** Set where the part, as written, looks an octave off. */
  looksOff: OctaveLooks | null;
  warnings: string[];
};

/** A line that stands in a number already. */
export type StandingLine = {
  roleId: string;
  source: "read" | "typed";
  partKey: string;
  octaveShift: number;
};

export type ReviewNumber = {
  id: string;
  version: number;
  label: string;
  title: string;
  lines: StandingLine[];
};

export type ReviewRole = { id: string; name: string; kind: RoleKind };

/** What a reading would become, before anyone has confirmed it. */
export type ScoreReview = {
  scoreId: string;
  fileName: string;
  title: string;
  composer: string | null;
  warnings: string[];
  parts: ReviewPart[];
  numbers: ReviewNumber[];
  roles: ReviewRole[];
  /** The number this file seems to be a newer reading of, if any. */
  numberId: string | null;
  proposed: {
    label: string;
    title: string;
    key: string;
    keyFifths: number | null;
    metre: string;
    tempo: string;
    bars: string;
    length: string;
  };
};

/** What becomes of one part. */
export type PartPlan = {
  scorePartId: string;
  /** "leave", "new", or the id of an existing role. */
  to: string;
  /** The new role's name. */
  name: string;
  kind: RoleKind;
  octaveShift: number;
};
