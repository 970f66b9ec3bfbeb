const WORDS: Record<string, string> = {
  Verification:
    "This link was used already, or its 30 minutes are over. Ask for a new one here: it takes the place of the old.",
  AccessDenied:
    "This address cannot sign in here. Ask the company that invited you which address it has.",
  EmailSignin: "The link could not be sent. Check the address and try again.",
};

/** What an error code in the address of the sign-in page means, and what to do; null when there is none. */
export function signInError(code: string | string[] | undefined): string | null {
  if (code === undefined) return null;
  return (
    (typeof code === "string" ? WORDS[code] : undefined) ??
    "Signing in did not work. Ask for a new link here; nothing else was changed."
  );
}
