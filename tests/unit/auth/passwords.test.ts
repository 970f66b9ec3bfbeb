import { describe, expect, test } from "vitest";
import { hashPassword, verifyPassword } from "@/lib/auth/password";
import { passwordWeakness } from "@/lib/auth/password-weakness";

const WREN = { email: "wren.tallis@people.example", name: "Wren Tallis" };

describe("a password that is long enough and still weak", () => {
  test.each([
    "wren.tallis@people.example",
    "WrenTallis2026",
    "tallis-wren-1",
    "Tallis!Tallis!",
    "people.example9",
  ])("%s is its owner's name or address", (password) => {
    expect(passwordWeakness(password, WREN)).toMatch(/name or address/);
  });

  test.each([
    "password1234",
    "PasswordPassword",
    "letmein-letmein",
    "welcome2026!!",
    "theatre-music-2026",
    "qwertyuiop12",
  ])("%s is tried first by others", (password) => {
    expect(passwordWeakness(password, WREN)).toMatch(/first that others would try/);
  });

  test.each([
    "aaaaaaaaaaaa",
    "abababababab",
    "123456789012",
    "abcdefghijkl mnop",
    "!!!!????!!!!....",
    "qwertyuiopas",
  ])("%s repeats or runs along the keys", (password) => {
    expect(passwordWeakness(password, WREN)).not.toBeNull();
  });

  test.each([
    "wren likes herons",
    "correct horse battery",
    "four brass lanterns",
    "Übergang zur Nacht",
    "πέντε μικρά κλειδιά",
    "музыка под дождём",
  ])("%s is neither", (password) => {
    expect(passwordWeakness(password, WREN)).toBeNull();
  });
});

describe("hashing", () => {
  test("the same password never gives the same hash, and only itself fits", async () => {
    const [one, two] = await Promise.all([
      hashPassword("four brass lanterns"),
      hashPassword("four brass lanterns"),
    ]);
    expect(one).not.toBe(two);
    expect(one).not.toContain("lanterns");
    expect(await verifyPassword("four brass lanterns", one)).toBe(true);
    expect(await verifyPassword("four brass lantern", one)).toBe(false);
  });

  test("a password typed with composed or combining letters is one password (Unicode normalisation, UAX 15)", async () => {
    expect(
      await verifyPassword(
        "cafe\u0301 au lait, cafe\u0301",
        await hashPassword("caf\u00e9 au lait, caf\u00e9"),
      ),
    ).toBe(true);
  });

  test.each(["", "scrypt$1$2", "bcrypt$a$b$c$d$e", "scrypt$131072$8$1$$"])(
    "a hash that cannot be read (%j) never fits",
    async (hash) => {
      expect(await verifyPassword("four brass lanterns", hash)).toBe(false);
    },
  );
});
