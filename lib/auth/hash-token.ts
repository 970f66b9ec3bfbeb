import "server-only";
import { createHash, randomBytes } from "node:crypto";

/** A new secret for a link or a token: 32 random bytes, base64url. Only its hash is kept. */
export function newSecret(): string {
  return randomBytes(32).toString("base64url");
}

/** SHA-256 of a secret, in hex: what the database keeps. Secrets are random, so no salt is needed. */
export function hashToken(secret: string): string {
  return createHash("sha256").update(secret).digest("hex");
}
