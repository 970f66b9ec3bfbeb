import { decodeText } from "./decode-text";
import { LIMITS } from "./limits";
import { listZip, unpackEntry } from "./read-zip";
import { ScoreError } from "./score-error";
import type { ScoreWarning } from "./types";
import { walkXml } from "./xml-events";

const CONTAINER = "META-INF/container.xml";
const MEDIA_TYPES = new Set(["", "application/vnd.recordare.musicxml+xml"]);

function isZip(bytes: Uint8Array): boolean {
  return bytes[0] === 0x50 && bytes[1] === 0x4b && bytes[2] === 0x03 && bytes[3] === 0x04;
}

/** The path of the first MusicXML root file that a container names. */
function rootFile(container: string): string | null {
  let path: string | null = null;
  walkXml(container, {
    open: (name, attributes) => {
      if (name === "rootfile" && path === null && MEDIA_TYPES.has(attributes["media-type"] ?? "")) {
        path = attributes["full-path"] ?? null;
      }
      return false;
    },
    collected: () => undefined,
    close: () => undefined,
  });
  return path;
}

function fromArchive(bytes: Uint8Array, warnings: ScoreWarning[]): Uint8Array {
  const entries = listZip(bytes);
  const container = entries.find(({ name }) => name === CONTAINER);
  let path: string | null;
  if (container) {
    path = rootFile(decodeText(unpackEntry(bytes, container)).text);
  } else {
    const scores = entries.filter(({ name }) => /^[^/\\]+\.(musicxml|xml)$/i.test(name));
    path = scores.length === 1 ? (scores[0]?.name ?? null) : null;
    if (path !== null) {
      warnings.push({
        code: "score.no-container",
        message: "The archive does not say which file is the score; its only one was read.",
      });
    }
  }
  // The path is looked up inside the archive and nowhere else.
  const entry = path === null ? undefined : entries.find(({ name }) => name === path);
  if (!entry) {
    throw new ScoreError(
      "score.archive",
      "The compressed file holds no score where it says it does. Export it again, or send it uncompressed (.musicxml).",
    );
  }
  const score = unpackEntry(bytes, entry);
  if (isZip(score)) {
    throw new ScoreError(
      "score.archive",
      "The archive holds another archive instead of a score. Unpack it once and choose the file inside.",
    );
  }
  return score;
}

/**
 * The XML text of a score, plain or compressed; which of the two is seen from its bytes, whatever
 * it is called. Throws a ScoreError for an empty or too large file, a bad archive or encoding.
 */
export function openScore(bytes: Uint8Array): { text: string; warnings: ScoreWarning[] } {
  if (bytes.length === 0) {
    throw new ScoreError("score.empty", "The file is empty. Export it again and choose it again.");
  }
  if (bytes.length > LIMITS.fileBytes) {
    throw new ScoreError(
      "score.too-large",
      `The file is larger than ${String(LIMITS.fileBytes / 1024 / 1024)} MB. Export it number by number.`,
    );
  }
  const warnings: ScoreWarning[] = [];
  const score = isZip(bytes) ? fromArchive(bytes, warnings) : bytes;
  if (score.length === 0) {
    throw new ScoreError("score.empty", "The score inside the file is empty. Export it again.");
  }
  const start = score.subarray(0, 400);
  // XML begins with "<", after a byte order mark and white space at most.
  const first = start.find(
    (byte) => ![0, 9, 10, 13, 32, 0xef, 0xbb, 0xbf, 0xff, 0xfe].includes(byte),
  );
  if (first !== 0x3c) {
    throw new ScoreError(
      "score.not-musicxml",
      "This is not a MusicXML file. In your notation program choose Export, then MusicXML.",
    );
  }
  const decoded = decodeText(score);
  return { text: decoded.text, warnings: [...warnings, ...decoded.warnings] };
}
