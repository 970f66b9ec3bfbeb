import "server-only";
import { DrizzleAdapter } from "@auth/drizzle-adapter";
import NextAuth from "next-auth";
import type { Adapter } from "next-auth/adapters";
import type { Provider } from "next-auth/providers";
import Nodemailer from "next-auth/providers/nodemailer";
import { db } from "@/db/client";
import { accounts, sessions, users, verificationTokens } from "@/db/schema";
import { createSignInMail } from "@/lib/data/sign-in";
import { takeVerificationToken } from "@/lib/data/verification";
import { env } from "@/lib/env";
import { startSession } from "./start-session";

const LINK_MINUTES = 30;

type AdapterTables = NonNullable<Parameters<typeof DrizzleAdapter<typeof db>>[1]>;

// Our ids and exact-text columns are custom types, which the adapter's own table types do not foresee.
const base = DrizzleAdapter(db, {
  usersTable: users,
  accountsTable: accounts,
  sessionsTable: sessions,
  verificationTokensTable: verificationTokens,
} as unknown as AdapterTables) as Required<Adapter>;

const adapter: Adapter = {
  ...base,
  createSession: (session) => startSession(session),
  useVerificationToken: takeVerificationToken,
};

export const { handlers, auth, signIn, signOut } = NextAuth({
  adapter,
  session: { strategy: "database", maxAge: 30 * 86_400, updateAge: 86_400 },
  secret: env().AUTH_SECRET,
  trustHost: true,
  pages: { signIn: "/sign-in", error: "/sign-in", verifyRequest: "/sign-in/sent", signOut: "/account" },
  providers: [
    Nodemailer({
      server: env().SMTP_URL,
      from: env().MAIL_FROM,
      maxAge: LINK_MINUTES * 60,
      normalizeIdentifier: (identifier) => identifier.trim().toLowerCase(),
      async sendVerificationRequest({ identifier, url }) {
        // The mail links to a page with a button, so that a mail scanner that follows links does not use the link up.
        const page = new URL("/sign-in/link", env().AUTH_URL);
        page.search = new URL(url).search;
        await createSignInMail(identifier, page.toString(), LINK_MINUTES);
      },
    }) as Provider,
  ],
  callbacks: {
    // The default would hand out the whole row of the user.
    session: ({ session, user }) => ({
      expires: session.expires,
      user: { id: user.id, name: user.name ?? null, email: user.email },
    }),
  },
  logger: { error: () => undefined, warn: () => undefined, debug: () => undefined },
});
