import { LIMITS } from "./limits";
import type { RoadSigns } from "./measure-record";

type Ending = { numbers: number[]; from: number; to: number; back: boolean };

/** A stretch between repeats: bars from–to, its first endings starting where the common bars stop. */
type Section = { from: number; to: number; passes: number; endings: Ending[] };

export type RoadMap =
  { order: number[]; jumps: number } | { order: null; reason: "structure" | "too-long" };

/** "1, 2" or "1-3" or "1. 2." → the numbers; null for anything else. */
function endingNumbers(text: string): number[] | null {
  const range = /^\s*(\d{1,2})\.?\s*-\s*(\d{1,2})\.?\s*$/.exec(text);
  if (range) {
    const [first, last] = [Number(range[1]), Number(range[2])];
    return last < first ? null : Array.from({ length: last - first + 1 }, (_, k) => first + k);
  }
  if (!/^[\s\d.,]+$/.test(text)) return null;
  const numbers = text.split(/[\s.,]+/).filter(Boolean);
  return numbers.length === 0 ? null : numbers.map(Number);
}

/** Each of 1 … n exactly once. */
function isComplete(endings: readonly Ending[]): boolean {
  const numbers = endings.flatMap((ending) => ending.numbers).sort((a, b) => a - b);
  return numbers.every((number, index) => number === index + 1);
}

/** Where the ending that starts at `from` stops; null when it runs into something else first. */
function readEnding(signs: readonly RoadSigns[], from: number): Ending | null {
  const numbers = endingNumbers(signs[from]?.endingStart ?? "");
  if (!numbers) return null;
  let closed: number | null = null;
  for (let at = from; at < signs.length; at += 1) {
    const here = signs[at];
    if (!here || (at > from && (here.endingStart !== null || here.forward))) break;
    // A repeat sign that opens inside an ending is a repeat within a repeat.
    if (at === from && here.forward) return null;
    if (closed === null && here.endingStop) closed = at;
    if (here.backward !== null) {
      // A bracket may stop early; the ending lasts to its backward repeat if another ending follows.
      const lasts = closed === null || closed === at || signs[at + 1]?.endingStart !== null;
      if (!lasts || at + 1 >= signs.length) break;
      return { numbers, from, to: at, back: true };
    }
  }
  if (closed !== null) {
    return { numbers, from, to: closed, back: signs[closed]?.backward !== null };
  }
  return { numbers, from, to: from, back: false };
}

/** The sections in order, or null when the signs contradict one another. */
function readSections(signs: readonly RoadSigns[]): Section[] | null {
  const sections: Section[] = [];
  let from = 0;
  let open = 0;
  let at = 0;
  while (at < signs.length) {
    const here = signs[at];
    if (!here) break;
    if (here.forward && at > from) {
      // Bars before a repeat sign are a section of their own.
      sections.push({ from, to: at - 1, passes: 1, endings: [] });
      from = at;
    }
    if (here.forward) open += 1;
    if (here.endingStart !== null) {
      const endings: Ending[] = [];
      while (at < signs.length && signs[at]?.endingStart !== null) {
        const ending = readEnding(signs, at);
        if (!ending) return null;
        endings.push(ending);
        at = ending.to + 1;
        if (!ending.back) break;
      }
      if (!isComplete(endings)) return null;
      const last = endings.at(-1);
      // An ending for several passes has to lead back.
      if (last && !last.back && last.numbers.length > 1) return null;
      const highest = Math.max(...endings.flatMap(({ numbers }) => numbers));
      // A first ending alone leaves the second one unmarked.
      const passes = last?.back === true && endings.length === 1 ? highest + 1 : highest;
      sections.push({ from, to: at - 1, passes, endings });
      from = at;
      open = 0;
      continue;
    }
    if (here.backward !== null) {
      if (open > 1) return null;
      sections.push({ from, to: at, passes: here.backward, endings: [] });
      from = at + 1;
      open = 0;
    }
    at += 1;
  }
  if (from < signs.length) {
    sections.push({ from, to: signs.length - 1, passes: 1, endings: [] });
  }
  // A bracket that stops where none began, after the endings were read, belongs to no structure.
  const bracketed = new Set(
    sections.flatMap(({ from: start, to, endings }) =>
      endings.length > 0 ? Array.from({ length: to - start + 1 }, (_, k) => start + k) : [],
    ),
  );
  if (signs.some(({ endingStop }, index) => endingStop && !bracketed.has(index))) return null;
  return sections;
}

/** The bars of one pass through a section. */
function passOf(section: Section, pass: number): number[] {
  const first = section.endings[0];
  const commonTo = first ? first.from - 1 : section.to;
  const bars: number[] = [];
  for (let at = section.from; at <= commonTo; at += 1) bars.push(at);
  const ending = section.endings.find(({ numbers }) => numbers.includes(pass));
  if (ending) for (let at = ending.from; at <= ending.to; at += 1) bars.push(at);
  return bars;
}

/** Bars played from `start` on after a jump: no repeats, last endings only, to Fine or the coda. */
function afterJump(
  signs: readonly RoadSigns[],
  sections: readonly Section[],
  start: number,
  taken: Set<number>,
): { bars: number[]; jumpAt: number | null } | null {
  const skipped = new Set<number>();
  for (const { endings, passes } of sections) {
    for (const { numbers, from, to } of endings) {
      if (numbers.includes(passes)) continue;
      for (let at = from; at <= to; at += 1) skipped.add(at);
    }
  }
  const bars: number[] = [];
  let at = start;
  let coda = false;
  while (at < signs.length) {
    const here = signs[at];
    if (here && !skipped.has(at)) {
      bars.push(at);
      if (here.fine) return { bars, jumpAt: null };
      if (here.toCoda !== null && !coda) {
        const target = markAt(signs, "coda", here.toCoda);
        if (target === null || target <= at) return null;
        coda = true;
        at = target;
        continue;
      }
      if ((here.daCapo || here.dalSegno !== null) && !taken.has(at)) return { bars, jumpAt: at };
    }
    at += 1;
  }
  return { bars, jumpAt: null };
}

/** The bar with the mark of that label, or the only mark when labels do not meet. */
function markAt(signs: readonly RoadSigns[], kind: "segno" | "coda", label: string): number | null {
  const exact = signs.findIndex((one) => one[kind] === label);
  if (exact >= 0) return exact;
  const all = signs.flatMap((one, index) => (one[kind] === null ? [] : [index]));
  return all.length === 1 ? (all[0] ?? null) : null;
}

/**
 * The order in which bars are performed. In: the signs of each bar. Out: bar indexes from 0, or null
 * with the reason. Rules: a backward repeat without a forward one goes to where its section starts;
 * after D.C. or D.S. repeats are not taken again, the last ending is, and the music stops at Fine or
 * goes from To Coda to the coda; each jump is taken once. Repeats within repeats and endings whose
 * numbers leave a gap are not understood.
 */
export function performedOrder(signs: readonly RoadSigns[]): RoadMap {
  const sections = readSections(signs);
  const isJump = ({ daCapo, dalSegno }: RoadSigns) => daCapo || dalSegno !== null;
  const wordsOnly = signs.some(({ jumpInWords }) => jumpInWords) && !signs.some(isJump);
  if (!sections || wordsOnly) return { order: null, reason: "structure" };
  const limit = signs.length + LIMITS.repeatedBars;
  const order: number[] = [];
  for (const section of sections) {
    if (section.passes > LIMITS.passes) return { order: null, reason: "too-long" };
    for (let pass = 1; pass <= section.passes; pass += 1) order.push(...passOf(section, pass));
    if (order.length > limit) return { order: null, reason: "too-long" };
  }
  // The first jump is taken when its bar is played for the last time.
  const first = Math.min(
    ...signs.flatMap((one, index) => (isJump(one) ? [order.lastIndexOf(index)] : [])),
  );
  if (!Number.isFinite(first)) return { order, jumps: 0 };
  order.length = first + 1;
  const taken = new Set<number>();
  let from = order.at(-1) ?? null;
  while (from !== null) {
    taken.add(from);
    const sign = signs[from];
    const target = sign?.dalSegno == null ? 0 : markAt(signs, "segno", sign.dalSegno);
    const next = target === null ? null : afterJump(signs, sections, target, taken);
    if (!next) return { order: null, reason: "structure" };
    for (const bar of next.bars) order.push(bar);
    if (order.length > limit) return { order: null, reason: "too-long" };
    from = next.jumpAt;
  }
  return { order, jumps: taken.size };
}
