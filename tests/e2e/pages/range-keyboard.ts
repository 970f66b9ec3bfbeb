import type { Locator } from "playwright-core";
import { midiOf } from "../helpers/reference";

const LETTERS = "CDEFGAB";
/** The keyboard is drawn from C2 on. */
const FIRST_OCTAVE = 2;
const NATURALS_DRAWN = 31;

/**
 * Taps two naturals on a drawn keyboard. Where a key lies follows from how keyboards are built: seven naturals of one
 * width to the octave, C first, and near the front edge nothing but naturals.
 */
export async function tapRange(group: Locator, low: string, high: string): Promise<void> {
  const keys = group.locator("svg").first();
  for (const pitch of [low, high]) {
    const box = await keys.boundingBox();
    if (!box) throw new Error("The keyboard is not drawn.");
    const natural = (Number(pitch.at(-1)) - FIRST_OCTAVE) * 7 + LETTERS.indexOf(pitch.at(0) ?? "C");
    const x = ((natural + 0.5) / NATURALS_DRAWN) * box.width;
    await keys.tap({ position: { x, y: box.height * 0.9 } });
  }
  await group.getByText(`${low} to ${high}`).waitFor();
}

/** Moves both ends of a range by the arrow keys. */
export async function keyRange(group: Locator, low: string, high: string): Promise<void> {
  for (const [name, pitch] of [
    ["Lowest note", low],
    ["Highest note", high],
  ] as const) {
    const slider = group.getByRole("slider", { name });
    const steps = midiOf(pitch) - Number(await slider.inputValue());
    await slider.focus();
    for (let step = 0; step < Math.abs(steps); step += 1)
      await slider.press(steps > 0 ? "ArrowRight" : "ArrowLeft");
  }
  await group.getByText(`${low} to ${high}`).waitFor();
}
