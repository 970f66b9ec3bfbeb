import { multiply, rational, subtract, type Rational } from "./rational";
import { child, childText, type XmlElement } from "./xml-events";

const TYPES: Record<string, Rational> = {
  maxima: rational(32n),
  long: rational(16n),
  breve: rational(8n),
  whole: rational(4n),
  half: rational(2n),
  quarter: rational(1n),
  eighth: rational(1n, 2n),
  "16th": rational(1n, 4n),
  "32nd": rational(1n, 8n),
  "64th": rational(1n, 16n),
  "128th": rational(1n, 32n),
  "256th": rational(1n, 64n),
};

/** The length of a note value in quarters, `dots` dotted; null for an unknown value. */
export function valueQuarters(type: string, dots: number): Rational | null {
  const plain = TYPES[type];
  if (!plain) return null;
  // A dot adds half of what was added before: in all 2 − 1/2^dots.
  return multiply(plain, subtract(rational(2n), rational(1n, 2n ** BigInt(Math.min(dots, 8)))));
}

/** The length of a note from its value, dots and tuplet; null when it has no known value. */
export function typeQuarters(note: XmlElement): Rational | null {
  const dots = note.children.filter(({ name }) => name === "dot").length;
  const plain = valueQuarters(childText(note, "type") ?? "", dots);
  const tuplet = child(note, "time-modification");
  if (!plain || !tuplet) return plain;
  const actual = Number(childText(tuplet, "actual-notes"));
  const normal = Number(childText(tuplet, "normal-notes"));
  if (!Number.isInteger(actual) || !Number.isInteger(normal) || actual < 1 || normal < 1) {
    return plain;
  }
  return multiply(plain, rational(BigInt(normal), BigInt(actual)));
}
