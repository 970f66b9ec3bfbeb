import { customType } from "drizzle-orm/mysql-core";
import { v7 } from "uuid";

/** Text that was to be an id is not one: to whoever asks, the same as an id that does not exist. */
export class NotAnIdError extends TypeError {
  override readonly name = "NotAnIdError";
}

/** UUID text → the 16 bytes that are stored. Throws on text that is not a UUID, so that a wrong id never becomes a wrong key. */
export function uuidToBytes(text: string): Buffer {
  const hex = text.replaceAll("-", "");
  if (!/^[0-9a-f]{32}$/i.test(hex)) throw new NotAnIdError("not a UUID");
  return Buffer.from(hex, "hex");
}

/** The 16 stored bytes → UUID text in lower case. */
export function bytesToUuid(bytes: Uint8Array): string {
  const hex = Buffer.from(bytes).toString("hex");
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-${hex.slice(12, 16)}-${hex.slice(16, 20)}-${hex.slice(20)}`;
}

/** A UUID kept as `binary(16)`: text in code and URLs, 16 bytes in keys. */
export const uuid = customType<{ data: string; driverData: Buffer }>({
  dataType: () => "binary(16)",
  toDriver: uuidToBytes,
  fromDriver: bytesToUuid,
});

/** Text compared byte by byte: tokens, hashes, addresses already folded to lower case. */
export const exactText = customType<{ data: string; config: { length: number } }>({
  dataType: (config) =>
    `varchar(${String(config?.length ?? 255)}) character set utf8mb4 collate utf8mb4_bin`,
});

/** A new id, made by the application (UUIDv7: in the order of making, so that keys stay in order). */
export function newId(): string {
  return v7();
}

/** The primary key every table of ours has. */
export const id = () => uuid("id").primaryKey().$defaultFn(newId);
