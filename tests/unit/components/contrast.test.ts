import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";

// The formulas of relative luminance and contrast ratio are those of WCAG 2.2
// (https://www.w3.org/TR/WCAG22/#dfn-relative-luminance, #dfn-contrast-ratio); 4.5 : 1 for text is
// success criterion 1.4.3, 3 : 1 for the parts of a control is 1.4.11.

const css = readFileSync(new URL("../../../app/globals.css", import.meta.url), "utf8");

function block(start: string): Map<string, string> {
  const from = css.indexOf(start);
  const body = css.slice(from, css.indexOf("\n  }\n", from) + 1);
  return new Map(
    [...body.matchAll(/--color-([a-z0-9-]+):\s*([^;]+);/g)].map((match) => [
      match[1] ?? "",
      (match[2] ?? "").trim(),
    ]),
  );
}

const themeEnd = css.indexOf("--font-sans");
const day = new Map(
  [...css.slice(0, themeEnd).matchAll(/--color-([a-z0-9-]+):\s*(#[0-9a-f]+);/g)].map((match) => [
    match[1] ?? "",
    match[2] ?? "",
  ]),
);
const lamp = new Map([...day, ...block('[data-mode="lamp"] {')]);

function resolve(set: Map<string, string>, name: string): string {
  const value = set.get(name);
  if (value === undefined) throw new Error(`no colour ${name}`);
  const alias = /^var\(--color-([a-z0-9-]+)\)$/.exec(value)?.[1];
  return alias === undefined ? value : resolve(set, alias);
}

function luminance(hex: string): number {
  const full = hex.length === 4 ? hex.replaceAll(/[0-9a-f]/g, (digit) => digit + digit) : hex;
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => {
    const channel = Number.parseInt(full.slice(at, at + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [light = 0, dark = 0] = [luminance(a), luminance(b)].toSorted((x, y) => y - x);
  return (light + 0.05) / (dark + 0.05);
}

test("the formula gives the two ends WCAG names: 21 for black on white, 1 for white on white", () => {
  expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 5);
  expect(contrast("#fff", "#ffffff")).toBe(1);
});

const text = ["ink", "ink-2", "vermilion", "smalt", "verdigris", "ochre"];
const grounds = ["paper", "sheet"];
const onWash = ["vermilion", "smalt", "verdigris", "ochre"];

describe.each([
  ["day", day],
  ["lamp", lamp],
])("colours in %s mode", (_, set) => {
  test.each(text.flatMap((name) => grounds.map((ground) => [name, ground] as const)))(
    "%s reads on %s",
    (name, ground) => {
      expect(contrast(resolve(set, name), resolve(set, ground))).toBeGreaterThanOrEqual(4.5);
    },
  );

  test.each(onWash)("%s and ink read on its wash", (name) => {
    const wash = resolve(set, `${name}-wash`);
    expect(contrast(resolve(set, name), wash)).toBeGreaterThanOrEqual(4.5);
    expect(contrast(resolve(set, "ink"), wash)).toBeGreaterThanOrEqual(4.5);
  });

  test("ink-2 reads on bone, and paper on every strong colour", () => {
    expect(contrast(resolve(set, "ink-2"), resolve(set, "bone"))).toBeGreaterThanOrEqual(4.5);
    for (const name of text) {
      expect(contrast(resolve(set, "paper"), resolve(set, name))).toBeGreaterThanOrEqual(4.5);
    }
  });

  test("the border of a control stands out from the sheet and the page", () => {
    for (const ground of grounds) {
      expect(contrast(resolve(set, "ink-3"), resolve(set, ground))).toBeGreaterThanOrEqual(3);
    }
  });

  test("the words on the lid and on the pressed key read", () => {
    for (const [a, b] of [
      ["lid-text", "lid"],
      ["lid-quiet", "lid"],
      ["lid-text", "lid-raised"],
      ["pressed-text", "pressed"],
    ] as const) {
      expect(contrast(resolve(set, a), resolve(set, b))).toBeGreaterThanOrEqual(4.5);
    }
  });

  test("a key in the range differs from one outside it", () => {
    expect(contrast(resolve(set, "key-edge"), resolve(set, "natural"))).toBeGreaterThanOrEqual(3);
  });
});
