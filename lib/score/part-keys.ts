const MAX = 80;

/**
 * A key for each part of a score, as a database compares them: part ids that differ only in case, in outer spaces or after
 * 80 characters get their place added, so that no two parts of one score are taken for the same line.
 */
export function partKeys(parts: readonly { id: string }[]): string[] {
  const seen = new Set<string>();
  return parts.map(({ id }, place) => {
    const plain = id.trim().slice(0, MAX) || "part";
    const folded = (text: string): string =>
      text.normalize("NFKD").replace(/\p{M}/gu, "").toLowerCase();
    const key =
      seen.has(folded(plain)) || plain.length < id.trim().length
        ? `${plain.slice(0, MAX - 5)}#${String(place)}`
        : plain;
    seen.add(folded(key));
    return key;
  });
}
