import { queryOptions } from "@tanstack/react-query";
import type { CallbackDraft, CallbackSinger } from "@/lib/data/callbacks/draft";
import type { AsJson } from "./as-json";
import { readJson } from "./read-json";

export type Draft = AsJson<CallbackDraft>;
export type DraftSinger = AsJson<CallbackSinger>;
export type DraftRound = NonNullable<Draft["round"]>;
export type DraftRole = Draft["roles"][number];

/** The callback list being drafted as the server has it. */
export function callbacksQuery(productionId: string) {
  return queryOptions({
    queryKey: ["callbacks", productionId],
    queryFn: () => readJson<Draft>(`/api/productions/${productionId}/callbacks`),
  });
}

/** The draft as it will be once a singer is marked for a role, or the mark is taken away. */
export function withMark(
  draft: Draft,
  mark: { personId: string; roleId: string; on: boolean },
): Draft {
  return {
    ...draft,
    singers: draft.singers.map((singer) => {
      if (singer.personId !== mark.personId) return singer;
      const others = singer.marks.filter((roleId) => roleId !== mark.roleId);
      return { ...singer, marks: mark.on ? [...others, mark.roleId] : others };
    }),
  };
}

export const SHOWN = {
  everyone: "Everyone",
  marked: "Called back",
  fits: "Fits",
  stretch: "Fits, or at a stretch",
  unsent: "Not sent yet",
} as const;

export type Shown = keyof typeof SHOWN;

/** Whether a singer belongs in what is shown, in any of the roles that are in view. */
export function isShown(
  singer: DraftSinger,
  roles: readonly DraftRole[],
  inView: readonly DraftRole[],
  shown: Shown,
): boolean {
  const verdicts = inView.map((role) => singer.fits[roles.indexOf(role)]?.verdict);
  switch (shown) {
    case "everyone":
      return true;
    case "marked":
      return inView.some((role) => singer.marks.includes(role.id));
    case "fits":
      return verdicts.includes("fits");
    case "stretch":
      return verdicts.includes("fits") || verdicts.includes("stretch");
    case "unsent":
      return singer.unsent !== "none";
  }
}

export type AnswerCount = { sent: number; yes: number; no: number; open: number };

/** How those who were told have answered. */
export function countAnswers(draft: Draft): AnswerCount {
  const sent = draft.singers.flatMap((singer) => singer.sent ?? []);
  const count = (answer: "yes" | "no" | null) => sent.filter((s) => s.answer === answer).length;
  return { sent: sent.length, yes: count("yes"), no: count("no"), open: count(null) };
}

const people = (count: number) => (count === 1 ? "1 person" : `${String(count)} people`);
const isAre = (count: number) => (count === 1 ? "is" : "are");

/** What publishing will do, in a sentence: "9 people are told, 2 unchanged, 1 taken off." */
export function previewInWords(preview: NonNullable<Draft["preview"]>): string {
  const parts = [`${people(preview.told)} ${isAre(preview.told)} told`];
  if (preview.unchanged > 0) parts.push(`${String(preview.unchanged)} unchanged`);
  if (preview.takenOff > 0) parts.push(`${String(preview.takenOff)} taken off`);
  return `${parts.join(", ")}.`;
}

/** Why the list cannot go out yet, as what to do; null when it can. */
export function whyNotYet(draft: Draft): string | null {
  if (!draft.round) return "Begin a round first.";
  if (draft.round.startsAt === null) return "Say when it is before the list goes out.";
  const marked = draft.singers.some((singer) => singer.marks.length > 0 && !singer.withdrawn);
  return marked ? null : "Tick who is called back before the list goes out.";
}
