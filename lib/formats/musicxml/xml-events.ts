import { SaxesParser } from "saxes";
import { LIMITS } from "./limits";
import { ScoreError } from "./score-error";

/** An element with what is in it, comments and instructions left out. */
export type XmlElement = {
  name: string;
  attributes: Record<string, string>;
  children: XmlElement[];
  text: string;
};

const KNOWN_ENTITIES = /&(?!(?:amp|lt|gt|quot|apos);|#)([\w.-]{1,40});/;

/** The name that a reference to an undeclared entity uses, for the message. */
function undeclaredEntity(text: string): string {
  return KNOWN_ENTITIES.exec(text)?.[0] ?? "an entity";
}

/**
 * Walks an XML text once. `open` sees each start tag and its depth (1 = root) and says whether the
 * whole element is to be collected; if so, `collected` gets it once it is complete.
 * Nothing outside the text is ever fetched. Throws a ScoreError for what is not well-formed XML,
 * declares entities, or is nested too deeply.
 */
export function walkXml(
  text: string,
  visitor: {
    open: (name: string, attributes: Record<string, string>, depth: number) => boolean;
    collected: (element: XmlElement) => void;
    close: (name: string, depth: number) => void;
  },
): void {
  const parser = new SaxesParser();
  const stack: XmlElement[] = [];
  let depth = 0;
  parser.on("doctype", (doctype) => {
    if (doctype.includes("<!ENTITY")) {
      throw new ScoreError(
        "score.entities",
        "The file declares XML entities, which are not allowed. Export it again from your notation program.",
      );
    }
  });
  parser.on("opentag", (tag) => {
    depth += 1;
    if (depth > LIMITS.depth) {
      throw new ScoreError(
        "score.too-deep",
        `The file nests its elements more than ${String(LIMITS.depth)} deep, which no score does. Export it again from your notation program.`,
      );
    }
    const collecting = stack.length > 0 || visitor.open(tag.name, tag.attributes, depth);
    if (!collecting) return;
    const element = { name: tag.name, attributes: tag.attributes, children: [], text: "" };
    stack.at(-1)?.children.push(element);
    stack.push(element);
  });
  const addText = (piece: string) => {
    const element = stack.at(-1);
    if (element) element.text += piece;
  };
  parser.on("text", addText);
  parser.on("cdata", addText);
  parser.on("closetag", (tag) => {
    const element = stack.pop();
    if (!element) visitor.close(tag.name, depth);
    else if (stack.length === 0) visitor.collected(element);
    depth -= 1;
  });
  parser.on("error", (error) => {
    // The parser's own words may quote the file, so only the place is passed on.
    const place = `line ${String(parser.line)}, column ${String(parser.column)}`;
    throw new ScoreError(
      "score.malformed",
      error.message.includes("undefined entity")
        ? `The file uses ${undeclaredEntity(text)} without saying what it stands for (${place}). Export it again from your notation program.`
        : `The file is not complete, correct XML: reading stopped at ${place}. Export it again from your notation program.`,
    );
  });
  parser.write(text).close();
}

export function child(element: XmlElement, name: string): XmlElement | undefined {
  return element.children.find((one) => one.name === name);
}

/** The trimmed text of a child; undefined when there is no such child. */
export function childText(element: XmlElement, name: string): string | undefined {
  return child(element, name)?.text.trim();
}
