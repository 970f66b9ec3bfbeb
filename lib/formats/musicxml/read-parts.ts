import { LIMITS } from "./limits";
import { PartReader } from "./part-reader";
import { ScoreError } from "./score-error";
import { childText, walkXml, type XmlElement } from "./xml-events";

const ROOTS = new Set(["score-partwise", "score-timewise"]);
const HEADER = new Set(["work", "movement-title", "identification", "part-list"]);

type ReadParts = {
  title: string | null;
  movement: string | null;
  composer: string | null;
  /** Names by part id, from the part list. */
  names: Map<string, string>;
  parts: PartReader[];
};

function checkRoot(name: string): void {
  if (ROOTS.has(name)) return;
  if (name === "opus") {
    throw new ScoreError(
      "score.collection",
      "This file only lists other scores. Choose the scores themselves, one by one.",
    );
  }
  const found = name.replace(/[^\w:.-]/g, "").slice(0, 40);
  throw new ScoreError(
    "score.not-musicxml",
    `This is not a MusicXML file: it begins with <${found}>. In your notation program choose Export, then MusicXML.`,
  );
}

function readHeader(element: XmlElement, read: ReadParts): void {
  if (element.name === "work") read.title = childText(element, "work-title") || read.title;
  if (element.name === "movement-title") read.movement = element.text.trim() || null;
  if (element.name === "identification") {
    const composer = element.children.find(
      ({ name, attributes }) => name === "creator" && attributes["type"] === "composer",
    );
    read.composer = composer?.text.trim() || null;
  }
  if (element.name !== "part-list") return;
  for (const part of element.children) {
    if (part.name !== "score-part") continue;
    read.names.set(part.attributes["id"] ?? "", childText(part, "part-name") ?? "");
  }
}

/**
 * Walks a score, by parts or by bars, and gives every element inside a bar to its part's reader.
 * Throws a ScoreError for another kind of file, two parts with one id, or no part at all.
 */
export function readParts(text: string): ReadParts {
  const readers = new Map<string, PartReader>();
  const read: ReadParts = {
    title: null,
    movement: null,
    composer: null,
    names: new Map(),
    parts: [],
  };
  let timewise = false;
  let part: PartReader | null = null;
  let bar: Record<string, string> | null = null;
  let inThisBar = new Set<string>();

  function enterPart(id: string): void {
    const known = readers.get(id);
    if (known && (!timewise || inThisBar.has(id))) {
      throw new ScoreError(
        "score.duplicate-part",
        `Two parts share the id "${id.slice(0, 40)}", so they cannot be told apart. Export the score again from your notation program.`,
      );
    }
    inThisBar.add(id);
    part = known ?? new PartReader(id);
    readers.set(id, part);
    if (readers.size > LIMITS.parts) {
      throw new ScoreError(
        "score.too-large",
        `The score has more than ${String(LIMITS.parts)} parts. Export only the ones you need.`,
      );
    }
  }

  walkXml(text, {
    open: (name, attributes, depth) => {
      if (depth === 1) {
        checkRoot(name);
        timewise = name === "score-timewise";
        return false;
      }
      if (depth === 2 && HEADER.has(name)) return true;
      const outer = timewise ? "measure" : "part";
      const inner = timewise ? "part" : "measure";
      if (depth === 2 && name === outer) {
        if (timewise) {
          bar = attributes;
          inThisBar = new Set();
        } else enterPart(attributes["id"] ?? "");
      } else if (depth === 3 && name === inner && (timewise ? bar : part)) {
        if (timewise) enterPart(attributes["id"] ?? "");
        else bar = attributes;
        part?.beginMeasure(bar ?? {});
      } else if (depth === 4 && part && bar) return true;
      return false;
    },
    collected: (element) => {
      if (part && bar) part.readElement(element);
      else readHeader(element, read);
    },
    close: (_name, depth) => {
      if (depth === 3) {
        if (timewise) part = null;
        else bar = null;
      } else if (depth === 2) {
        part = null;
        bar = null;
      }
    },
  });
  read.parts = [...readers.values()];
  if (!read.parts.some(({ measures }) => measures.length > 0)) {
    throw new ScoreError(
      "score.no-music",
      "The score has no music in it. Export it again with its parts.",
    );
  }
  return read;
}
