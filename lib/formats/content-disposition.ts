/**
 * The header that has a file saved under a name (RFC 6266): a plain name for old readers, and the whole of
 * it, encoded as RFC 8187 says, for the others. Characters that no file name may hold become spaces.
 */
export function contentDisposition(name: string): string {
  const safe =
    name
      .replace(/[\u0000-\u001f\u007f"\\/:*?<>|]+/g, " ")
      .replace(/\s+/g, " ")
      .trim() || "file";
  const plain = safe
    .normalize("NFKD")
    .replace(/\p{M}+/gu, "")
    .replace(/[’‘]/g, "'")
    .replace(/[–—]/g, "-")
    .replace(/[^\x20-\x7e]+/g, "_");
  const encoded = encodeURIComponent(safe).replace(
    /['()*]/g,
    (char) => `%${char.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
