const plain = (text: string) =>
  text
    .normalize("NFD")
    .replace(/\p{Diacritic}/gu, "")
    .toLowerCase();

/** Whether every word typed is somewhere in the text, whatever its case or accents. */
export function matches(text: string, typed: string): boolean {
  const inside = plain(text);
  return plain(typed)
    .split(/\s+/)
    .every((word) => inside.includes(word));
}
