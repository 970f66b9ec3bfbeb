/** From here on the given login asks (null: nobody). */
export function as(userId: string | null): void {
  (globalThis as unknown as { cembaloAsking: { userId: string | null } }).cembaloAsking.userId =
    userId;
}

/** The cookies that actions under test have set. */
export function cookieJar(): Map<string, string> {
  return (globalThis as unknown as { cembaloCookies: Map<string, string> }).cembaloCookies;
}
