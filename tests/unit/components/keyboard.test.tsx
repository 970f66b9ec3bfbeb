import { renderToStaticMarkup } from "react-dom/server";
import { describe, expect, test } from "vitest";
import { HistogramKeyboard } from "@/components/music/histogram-keyboard";
import { isSharp, layKeys } from "@/components/music/keyboard-geometry";
import { LineOnScale } from "@/components/music/line-on-scale";
import { PitchKeyboard } from "@/components/music/pitch-keyboard";
import { RangeBar } from "@/components/music/range-bar";
import { RangeKeyboard, keyAt } from "@/components/music/range-keyboard";
import { rangeInWords } from "@/components/music/range-in-words";

describe("the keys of a drawn keyboard", () => {
  test("a full piano, A0 to C8, has 52 naturals and 36 sharps", () => {
    // Common practice, no source; the MIDI numbers of its ends (21, 108) from memory.
    const { keys, width } = layKeys(21, 108);
    expect(width).toBe(52);
    expect(keys.filter((key) => key.sharp)).toHaveLength(36);
    expect(keys.filter((key) => !key.sharp)).toHaveLength(52);
  });

  test("an end on a sharp moves out to the next natural", () => {
    const { keys } = layKeys(61, 70);
    expect(keys[0]?.midi).toBe(60);
    expect(keys.at(-1)?.midi).toBe(71);
  });

  test("every sharp lies over the edge between the naturals beside it", () => {
    const { keys } = layKeys(36, 88);
    for (const key of keys.filter(({ midi }) => isSharp(midi))) {
      const below = keys.find(({ midi }) => midi === key.midi - 1);
      expect(key.x + key.width / 2).toBeCloseTo((below?.x ?? NaN) + 1, 10);
    }
  });

  test("the middle of a pitch outside the keyboard is its nearest end", () => {
    const keyboard = layKeys(48, 72);
    expect(keyboard.middle(20)).toBe(keyboard.middle(48));
    expect(keyboard.middle(100)).toBe(keyboard.middle(72));
  });
});

describe("the key under a finger", () => {
  const { keys } = layKeys(60, 71);

  test("near the player every point is a natural", () => {
    expect(keyAt(keys, 0.95, 0.9)?.midi).toBe(60);
    expect(keyAt(keys, 1.05, 0.9)?.midi).toBe(62);
  });

  test("at the back a sharp answers over its own width and a little more", () => {
    expect(keyAt(keys, 1, 0.2)?.midi).toBe(61);
    expect(keyAt(keys, 0.65, 0.2)?.midi).toBe(61);
    expect(keyAt(keys, 0.5, 0.2)?.midi).toBe(60);
  });

  test("there is no sharp between E and F, and nothing beside the keyboard", () => {
    expect(keyAt(keys, 3, 0.2)?.midi).toBe(65);
    expect(keyAt(keys, 9, 0.2)).toBeUndefined();
  });
});

describe("what the drawings say to those who do not see them", () => {
  test("a range, and a comfortable one only where it is narrower", () => {
    expect(rangeInWords({ low: 55, high: 79 })).toBe("G3–G5");
    expect(rangeInWords({ low: 55, high: 79, comfortableLow: 59, comfortableHigh: 74 })).toBe(
      "G3–G5, comfortable B3–D5",
    );
    const html = renderToStaticMarkup(
      <PitchKeyboard label="Range heard" range={{ low: 55, high: 79 }} />,
    );
    expect(html).toContain('aria-label="Range heard: G3–G5"');
  });

  test("a histogram names its span, its tessitura and its longest pitch", () => {
    const html = renderToStaticMarkup(
      <HistogramKeyboard
        label="What Maren sings"
        low={58}
        high={81}
        tessitura={{ low: 65, high: 74 }}
        histogram={{ "58": 1, "69": 6, "74": 3 }}
      />,
    );
    expect(html).toContain(
      "What Maren sings: B♭3 to A5; mostly F4 to D5; longest on A4, 60 % of the sung time",
    );
  });

  test("a line on a scale says its ends", () => {
    const html = renderToStaticMarkup(
      <LineOnScale low={62} high={76} scale={{ low: 53, high: 81 }} />,
    );
    expect(html).toContain('aria-label="D4 to E5"');
  });
});

describe("a role's range beside a singer's", () => {
  const role = { low: 58, high: 81, tessitura: { low: 65, high: 74 } };
  const dashes = (html: string) => html.split("stroke-dasharray").length - 1;

  test("one that fits has no dashed mark", () => {
    const html = renderToStaticMarkup(
      <RangeBar role={role} singer={{ low: 57, high: 84 }} verdict="fits" words="Fits" />,
    );
    expect(dashes(html)).toBe(0);
    expect(html).toContain("Fits. Role B♭3–A5, singer A3–C6.");
  });

  test("each end that is short gets its mark", () => {
    const top = renderToStaticMarkup(
      <RangeBar
        role={role}
        singer={{ low: 55, high: 79 }}
        verdict="stretch"
        words="2 short at top"
      />,
    );
    expect(dashes(top)).toBe(1);
    const both = renderToStaticMarkup(
      <RangeBar
        role={role}
        singer={{ low: 60, high: 79 }}
        verdict="out"
        words="2 short at top, 2 below"
      />,
    );
    expect(dashes(both)).toBe(2);
  });

  test("a hopeless one steps back as a drawing but not as words", () => {
    const html = renderToStaticMarkup(
      <RangeBar role={role} singer={{ low: 41, high: 67 }} verdict="out" words="14 short at top" />,
    );
    expect(html).toMatch(/<svg[^>]*opacity-45/);
    expect(html).toMatch(/text-ink-2[^>]*>14 short at top/);
  });
});

describe("the keyboard one chooses a range on", () => {
  const nothing = () => undefined;

  test("has two named sliders that say their pitch", () => {
    const html = renderToStaticMarkup(
      <RangeKeyboard
        label="The range you sing"
        value={{ low: 55, high: null }}
        onChange={nothing}
      />,
    );
    expect(html).toMatch(/type="range"[^>]*aria-label="Lowest note" aria-valuetext="G3"/);
    expect(html).toMatch(/type="range"[^>]*aria-label="Highest note" aria-valuetext="not chosen"/);
    expect(html).toContain('role="group" aria-label="The range you sing"');
  });

  test("carries a field's error to both", () => {
    const html = renderToStaticMarkup(
      <RangeKeyboard
        label="Range"
        value={{ low: null, high: null }}
        onChange={nothing}
        aria-describedby="range-error"
        aria-invalid
      />,
    );
    expect(html.match(/aria-invalid="true"/g)).toHaveLength(2);
    expect(html.match(/aria-describedby="range-error [^"]+"/g)).toHaveLength(2);
  });
});
