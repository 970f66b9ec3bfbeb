import { Inflate } from "fflate";
import { LIMITS } from "./limits";
import { ScoreError } from "./score-error";

const END_RECORD = 0x06054b50;
const ENTRY_RECORD = 0x02014b50;
const LOCAL_RECORD = 0x04034b50;
const END_SIZE = 22;
const ENTRY_SIZE = 46;
const LOCAL_SIZE = 30;
const CHUNK = 16 * 1024;

type ZipEntry = { name: string; method: number; offset: number; packedBytes: number };

function damaged(): ScoreError {
  return new ScoreError(
    "score.archive",
    "The compressed score is damaged or cut off. Export it again, or send it uncompressed (.musicxml).",
  );
}

function tooLarge(): ScoreError {
  return new ScoreError(
    "score.too-large",
    `Unpacked, the score is larger than ${String(LIMITS.unpackedBytes / 1024 / 1024)} MB. Export it number by number.`,
  );
}

/**
 * Lists a zip archive from its central directory. Nothing is unpacked and no declared size is
 * trusted. Throws a ScoreError for damage, passwords and too many entries.
 */
export function listZip(bytes: Uint8Array): ZipEntry[] {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let end = bytes.length - END_SIZE;
  const earliest = Math.max(0, end - 0xffff);
  while (end >= earliest && view.getUint32(end, true) !== END_RECORD) end -= 1;
  if (end < earliest) throw damaged();
  const count = view.getUint16(end + 10, true);
  if (count > LIMITS.archiveEntries) {
    throw new ScoreError(
      "score.archive",
      `The archive holds ${String(count)} files; a score holds a few. Choose the score itself.`,
    );
  }
  const entries: ZipEntry[] = [];
  let at = view.getUint32(end + 16, true);
  for (let index = 0; index < count; index += 1) {
    if (at + ENTRY_SIZE > bytes.length || view.getUint32(at, true) !== ENTRY_RECORD) {
      throw damaged();
    }
    if ((view.getUint16(at + 8, true) & 1) === 1) {
      throw new ScoreError(
        "score.archive-password",
        "The score is protected by a password. Save it without one and choose it again.",
      );
    }
    const nameLength = view.getUint16(at + 28, true);
    const name = bytes.subarray(at + ENTRY_SIZE, at + ENTRY_SIZE + nameLength);
    entries.push({
      name: new TextDecoder().decode(name),
      method: view.getUint16(at + 10, true),
      packedBytes: view.getUint32(at + 20, true),
      offset: view.getUint32(at + 42, true),
    });
    at += ENTRY_SIZE + nameLength + view.getUint16(at + 30, true) + view.getUint16(at + 32, true);
  }
  return entries;
}

/**
 * Unpacks one entry, counting the bytes as they come and stopping at the limit.
 * Throws a ScoreError for damage, an unknown method, or too much.
 */
export function unpackEntry(bytes: Uint8Array, entry: ZipEntry): Uint8Array {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const { offset } = entry;
  if (offset + LOCAL_SIZE > bytes.length || view.getUint32(offset, true) !== LOCAL_RECORD) {
    throw damaged();
  }
  const from =
    offset + LOCAL_SIZE + view.getUint16(offset + 26, true) + view.getUint16(offset + 28, true);
  const packed = bytes.subarray(from, from + entry.packedBytes);
  if (packed.length < entry.packedBytes) throw damaged();
  if (entry.method === 0) {
    if (packed.length > LIMITS.unpackedBytes) throw tooLarge();
    return packed;
  }
  if (entry.method !== 8) throw damaged();
  const chunks: Uint8Array[] = [];
  let size = 0;
  let finished = false as boolean;
  const inflate = new Inflate((chunk, final) => {
    size += chunk.length;
    if (size > LIMITS.unpackedBytes) throw tooLarge();
    chunks.push(chunk);
    finished ||= final;
  });
  try {
    for (let start = 0; start < packed.length; start += CHUNK) {
      inflate.push(packed.subarray(start, start + CHUNK), start + CHUNK >= packed.length);
    }
  } catch (error) {
    throw error instanceof ScoreError ? error : damaged();
  }
  if (!finished) throw damaged();
  const whole = new Uint8Array(size);
  let to = 0;
  for (const chunk of chunks) {
    whole.set(chunk, to);
    to += chunk.length;
  }
  return whole;
}
