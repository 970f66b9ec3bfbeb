import "server-only";
import { createHash } from "node:crypto";
import { mkdir, readFile, rename, writeFile } from "node:fs/promises";
import path from "node:path";
import { v7 } from "uuid";
import { env } from "@/lib/env";

export type StoredFile = { storageKey: string; sha256: string; bytes: number };

function pathOf(key: string): string {
  if (!/^[0-9a-f]{2}\/[0-9a-f-]{36}$/.test(key)) throw new Error("not a storage key");
  return path.join(path.resolve(/* turbopackIgnore: true */ env().STORAGE_DIR), key);
}

/** Keeps the bytes under a name of ours and tells key, SHA-256 and length. The file appears whole or not at all. */
export async function storeFile(bytes: Uint8Array): Promise<StoredFile> {
  const id = v7();
  const storageKey = `${id.slice(-2)}/${id}`;
  const target = pathOf(storageKey);
  await mkdir(path.dirname(target), { recursive: true });
  await writeFile(`${target}.part`, bytes, { mode: 0o600 });
  await rename(`${target}.part`, target);
  return {
    storageKey,
    sha256: createHash("sha256").update(bytes).digest("hex"),
    bytes: bytes.byteLength,
  };
}

/** The bytes kept under a key. Throws when there are none. */
export async function readStoredFile(storageKey: string): Promise<Uint8Array> {
  return readFile(pathOf(storageKey));
}
