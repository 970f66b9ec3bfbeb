import { steady } from "./names";

export type VoiceKind = "soprano" | "mezzo" | "alto" | "tenor" | "baritone" | "bass";

export const VOICE_KINDS: VoiceKind[] = ["soprano", "mezzo", "alto", "tenor", "baritone", "bass"];

// From memory, rounded to everyday figures: only to give the invented singers believable ranges.
const TYPICAL: Record<VoiceKind, [low: number, high: number]> = {
  soprano: [58, 83],
  mezzo: [55, 79],
  alto: [52, 75],
  tenor: [47, 70],
  baritone: [42, 66],
  bass: [38, 62],
};

/** An invented singer's range: the typical one of their voice, moved a little, with the middle of it comfortable. */
export function inventedRange(
  kind: VoiceKind,
  seed: number,
): { low: number; high: number; comfortableLow: number; comfortableHigh: number } {
  const [low, high] = TYPICAL[kind];
  const from = low + Math.round((steady(seed) - 0.5) * 5);
  const to = high + Math.round((steady(seed + 0.5) - 0.5) * 5);
  return { low: from, high: to, comfortableLow: from + 3, comfortableHigh: to - 4 };
}

/** An invented histogram of sung quarters between two notes: most of it in the middle, on a scale's notes. */
export function inventedHistogram(
  low: number,
  high: number,
  quarters: number,
  seed: number,
): Record<string, number> {
  const weights = new Map<number, number>();
  for (let pitch = low; pitch <= high; pitch += 1) {
    const at = (pitch - low) / Math.max(1, high - low);
    const inScale = [0, 2, 4, 5, 7, 9, 11].includes(pitch % 12) ? 1 : 0.25;
    weights.set(
      pitch,
      (0.12 + Math.exp(-(((at - 0.55) / 0.24) ** 2))) *
        inScale *
        (0.7 + 0.6 * steady(seed + pitch)),
    );
  }
  const sum = [...weights.values()].reduce((a, b) => a + b, 0);
  return Object.fromEntries(
    [...weights].map(([pitch, weight]) => [
      String(pitch),
      Math.max(0.5, Math.round((weight / sum) * quarters * 2) / 2),
    ]),
  );
}
