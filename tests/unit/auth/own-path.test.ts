import { describe, expect, test } from "vitest";
import { ownPath } from "@/lib/auth/own-path";

describe("where signing in may lead", () => {
  test.each([
    ["/me", "/me"],
    ["/me/conflicts?x=1#add", "/me/conflicts?x=1#add"],
    ["/productions/01a/score", "/productions/01a/score"],
    ["/a/../me", "/me"],
    ["/signing-in-early", "/signing-in-early"],
  ])("%s is a path of our own", (raw, path) => {
    expect(ownPath(raw, "/fallback")).toBe(path);
  });

  // The spellings are those of OWASP's cheat sheet on unvalidated redirects and of the WHATWG URL standard: browsers read a
  // backslash as a slash, drop tabs and line breaks, and take two slashes for another host.
  test.each([
    "https://evil.example",
    "//evil.example",
    "///evil.example",
    "/\\evil.example",
    "\\/evil.example",
    "/\t/evil.example",
    "/\n/evil.example",
    "javascript:alert(1)",
    "data:text/html,x",
    "me",
    "",
    " /me",
    "/..//evil.example",
    "/.//evil.example",
    "/x/..//evil.example",
    "/\u0000/evil.example",
    "/api/auth/signout",
    "/sign-in",
    "/sign-in/link?token=x",
    `/${"a".repeat(1001)}`,
  ])("%j is not", (raw) => {
    expect(ownPath(raw, "/fallback")).toBe("/fallback");
  });

  test.each([undefined, null, 7, ["/me"], { to: "/me" }])("%j, which is no text, is not", (raw) => {
    expect(ownPath(raw, "/fallback")).toBe("/fallback");
  });

  test("whatever it gives back stays on our site when a browser follows it", () => {
    for (const raw of [
      "/%2f%2fevil.example",
      "/%5cevil.example",
      "/me?next=//evil.example",
      "/@evil.example",
      "/.evil.example",
    ]) {
      expect(new URL(ownPath(raw, "/"), "https://cembalo.example/sign-in").host).toBe(
        "cembalo.example",
      );
    }
  });
});
