/**
 * The most common beginnings of passwords of twelve characters and more (common practice, no source; from memory): one of
 * these with some digits behind it is among the first that are tried.
 */
const COMMON = [
  "password", "passw0rd", "motdepasse", "passwort", "wachtwoord", "contrasena", "letmein", "welcome", "administrator", "iloveyou",
  "sunshine", "princess", "football", "baseball", "superman", "trustno1", "changeme", "qwerty", "qwertyuiop", "azerty", "azertyuiop",
  "asdfghjkl", "zxcvbnm", "1qaz2wsx", "q1w2e3r4", "abcdefghijkl", "monkey", "dragon", "master", "login", "secret", "cembalo", "theatre", "music",
];
const RUNS = ["01234567890123456789", "98765432109876543210", "abcdefghijklmnopqrstuvwxyz", "qwertyuiopasdfghjklzxcvbnm"];

const fold = (text: string): string => text.normalize("NFKC").toLowerCase().replace(/[^\p{L}\p{N}]+/gu, "");

/**
 * What is wrong with a password that is long enough, in words that say what to do; null when nothing is. It must not be the
 * address or name with a little added, one of the passwords everyone tries first, a run of keys, or a few characters repeated.
 */
export function passwordWeakness(password: string, owner: { email: string; name: string }): string | null {
  const folded = fold(password);
  const without = (text: string): string => folded.replaceAll(text, "");
  const own = [fold(owner.email), fold(owner.email.split("@")[0] ?? ""), fold(owner.name), ...owner.name.split(/\s+/).map(fold)].filter((text) => text.length >= 4);
  if (own.some((text) => folded.includes(text) && without(text).length < 8)) {
    return "This holds your name or address, and little else. Choose words that are not about you.";
  }
  if (COMMON.some((text) => folded.includes(text) && without(text).length < 6)) {
    return "This is among the first that others would try. Choose a few words that do not belong together.";
  }
  if (new Set(password).size < 5 || RUNS.some((run) => run.includes(folded)) || folded.length < 6) {
    return "This repeats a few keys or runs along them. Choose a few words that do not belong together.";
  }
  return null;
}
