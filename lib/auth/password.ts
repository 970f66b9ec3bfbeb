import "server-only";
import { randomBytes, scrypt, timingSafeEqual } from "node:crypto";

// Parameters of OWASP's Password Storage Cheat Sheet for scrypt: N=2^17, r=8, p=1 (from memory).
const COST = { N: 2 ** 17, r: 8, p: 1 };
const MAX_MEMORY = 256 * 1024 * 1024;

function derive(password: string, salt: Buffer, cost: typeof COST): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    scrypt(password.normalize("NFKC"), salt, 32, { ...cost, maxmem: MAX_MEMORY }, (error, key) => {
      if (error) reject(error);
      else resolve(key);
    });
  });
}

/** A password → `scrypt$N$r$p$salt$key`. The password is normalised (NFKC), so that one typed on another keyboard still fits. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(16);
  const key = await derive(password, salt, COST);
  return `scrypt$${COST.N}$${COST.r}$${COST.p}$${salt.toString("base64url")}$${key.toString("base64url")}`;
}

/** Whether the password is the one the hash was made from. A hash that cannot be read is never a match. */
export async function verifyPassword(password: string, stored: string): Promise<boolean> {
  const [kind, n, r, p, salt, key] = stored.split("$");
  if (kind !== "scrypt" || !n || !r || !p || !salt || !key) return false;
  const expected = Buffer.from(key, "base64url");
  const actual = await derive(password, Buffer.from(salt, "base64url"), {
    N: Number(n),
    r: Number(r),
    p: Number(p),
  });
  return expected.length === actual.length && timingSafeEqual(expected, actual);
}

/** Takes as long as a check of a real password, so that an unknown address cannot be told by the clock. */
export async function pretendToVerify(password: string): Promise<void> {
  await derive(password, Buffer.alloc(16), COST);
}
