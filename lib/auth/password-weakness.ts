/**
 * The most common beginnings of passwords of twelve characters and more (common practice, no source; from memory): one of
 * these with some digits behind it is among the first that are tried.
 */
const COMMON = [
  "password",
  "passw0rd",
  "motdepasse",
  "passwort",
  "wachtwoord",
  "contrasena",
  "letmein",
  "welcome",
  "administrator",
  "iloveyou",
  "sunshine",
  "princess",
  "football",
  "baseball",
  "superman",
  "trustno1",
  "changeme",
  "qwerty",
  "qwertyuiop",
  "azerty",
  "azertyuiop",
  "asdfghjkl",
  "zxcvbnm",
  "1qaz2wsx",
  "q1w2e3r4",
  "abcdefghijkl",
  "monkey",
  "dragon",
  "master",
  "login",
  "secret",
  "cembalo",
  "theatre",
  "music",
];
const RUNS = [
  "01234567890123456789",
  "98765432109876543210",
  "abcdefghijklmnopqrstuvwxyz",
  "qwertyuiopasdfghjklzxcvbnm",
];

const fold = (text: string): string =>
  text
    .normalize("NFKC")
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, "");

/** Whether the text holds one of the words, and next to nothing but such words and digits. */
function holdsLittleElse(text: string, words: readonly string[]): boolean {
  const long = words.filter((word) => word.length >= 4).toSorted((a, b) => b.length - a.length);
  const rest = long.reduce((left, word) => left.replaceAll(word, ""), text);
  return rest !== text && rest.replace(/\p{N}+/gu, "").length < 4;
}

/**
 * What is wrong with a password that is long enough, in words that say what to do; null when nothing is. It must not be the
 * address or name with a little added, one of the passwords everyone tries first, a run of keys, or a few characters repeated.
 */
export function passwordWeakness(
  password: string,
  owner: { email: string; name: string },
): string | null {
  const folded = fold(password);
  const own = [
    owner.email,
    owner.email.split("@")[0] ?? "",
    owner.name,
    ...owner.name.split(/[\s-]+/),
    ...owner.email.split(/[@.]/),
  ].map(fold);
  if (holdsLittleElse(folded, own))
    return "This holds your name or address, and little else. Choose words that are not about you.";
  if (holdsLittleElse(folded, COMMON))
    return "This is among the first that others would try. Choose a few words that do not belong together.";
  if (new Set(password).size < 5 || RUNS.some((run) => run.includes(folded)) || folded.length < 6) {
    return "This repeats a few keys or runs along them. Choose a few words that do not belong together.";
  }
  return null;
}
