/** Key names by fifths, −7 to 7; a capital letter is major, a small one minor. */
const MAJOR = ["C♭", "G♭", "D♭", "A♭", "E♭", "B♭", "F", "C", "G", "D", "A", "E", "B", "F♯", "C♯"];
const MINOR = ["a♭", "e♭", "b♭", "f", "c", "g", "d", "a", "e", "b", "f♯", "c♯", "g♯", "d♯", "a♯"];
const CENTRE = 7;

const WRITTEN = /^([A-Ga-g])\s*([#♯b♭]?|sharp|flat)\s*([Mm]ajor|[Mm]aj|[Mm]inor|[Mm]in|m)?$/;

export type MusicalKey = { name: string; fifths: number };

/**
 * Reads a key as people type it: "E♭", "Eb", "c♯", "C minor", "F sharp minor", "Bbm". Without a word, a capital letter is
 * major and a small one minor. Out: its name in this house's spelling and its fifths (−7 to 7); null for anything else.
 */
export function parseKey(text: string): MusicalKey | null {
  const match = WRITTEN.exec(text.trim().replace(/\s+/g, " "));
  if (!match) return null;
  const [, letter = "", sign = "", mode = ""] = match;
  const accidental = /^(#|♯|sharp)$/.test(sign) ? "♯" : /^(b|♭|flat)$/.test(sign) ? "♭" : "";
  const minor = mode === "" ? letter === letter.toLowerCase() : /^m(in|$)/i.test(mode);
  const name = `${minor ? letter.toLowerCase() : letter.toUpperCase()}${accidental}`;
  const index = (minor ? MINOR : MAJOR).indexOf(name);
  return index < 0 ? null : { name, fifths: index - CENTRE };
}

/** The major key of a signature. In: fifths, −7 to 7. Out: "E♭"; null outside that. */
export function majorKeyOf(fifths: number): string | null {
  return MAJOR[fifths + CENTRE] ?? null;
}

/** "4 sharps", "1 flat", "no sharps or flats": what a signature shows when nobody has said major or minor. */
export function signatureInWords(fifths: number): string {
  if (fifths === 0) return "no sharps or flats";
  const count = Math.abs(fifths);
  return `${String(count)} ${fifths > 0 ? "sharp" : "flat"}${count === 1 ? "" : "s"}`;
}

/** What a column has room for: the key's name, or its signature as "4♯" while nobody has said major or minor; empty for neither. */
export function keyInShort(key: { keyName: string | null; keyFifths: number | null }): string {
  if (key.keyName !== null) return key.keyName;
  if (key.keyFifths === null) return "";
  if (key.keyFifths === 0) return "0♯";
  return `${String(Math.abs(key.keyFifths))}${key.keyFifths > 0 ? "♯" : "♭"}`;
}
