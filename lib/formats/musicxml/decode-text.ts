import { ScoreError } from "./score-error";
import type { ScoreWarning } from "./types";

const DECLARED = /^<\?xml[^>]*?\sencoding\s*=\s*["']([A-Za-z0-9._-]+)["']/;

function startsWith(bytes: Uint8Array, ...start: number[]): boolean {
  return start.every((byte, index) => bytes[index] === byte);
}

/** UTF-16 and UTF-8 give themselves away in their first bytes, with a byte order mark or without. */
function encodingOfBytes(bytes: Uint8Array): string | null {
  if (startsWith(bytes, 0xef, 0xbb, 0xbf)) return "utf-8";
  if (startsWith(bytes, 0xff, 0xfe) || startsWith(bytes, 0x3c, 0x00)) return "utf-16le";
  if (startsWith(bytes, 0xfe, 0xff) || startsWith(bytes, 0x00, 0x3c)) return "utf-16be";
  return null;
}

/**
 * The text of an XML file in whatever encoding it is. What the bytes show goes before what the
 * declaration says. Throws a ScoreError for an unknown encoding or bytes that are not of it.
 */
export function decodeText(bytes: Uint8Array): { text: string; warnings: ScoreWarning[] } {
  const warnings: ScoreWarning[] = [];
  let encoding = encodingOfBytes(bytes);
  if (encoding === null) {
    const start = String.fromCharCode(...bytes.subarray(0, 300));
    encoding = DECLARED.exec(start)?.[1]?.toLowerCase() ?? "utf-8";
    // A readable declaration in single bytes cannot be UTF-16.
    if (encoding.startsWith("utf-16") || encoding.startsWith("ucs-2")) {
      encoding = "utf-8";
      warnings.push({
        code: "score.encoding-declared",
        message: "The file says it is UTF-16 but is not; it was read as UTF-8. Check the names.",
      });
    }
  }
  let decoder: TextDecoder;
  try {
    decoder = new TextDecoder(encoding, { fatal: true });
  } catch {
    throw new ScoreError(
      "score.encoding",
      `The file is in the encoding "${encoding.slice(0, 40)}", which cannot be read here. Export it again as UTF-8.`,
    );
  }
  try {
    return { text: decoder.decode(bytes), warnings };
  } catch {
    throw new ScoreError(
      "score.encoding",
      `The file says it is ${encoding.toUpperCase()} but holds bytes that are not. Export it again from your notation program.`,
    );
  }
}
